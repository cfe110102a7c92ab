"""Ripple of an ideal unfiltered rectifier: rms of the alternating part over the mean, resistive load."""

import math
from itertools import pairwise

from lineplanner.inputs.line import RipplePoint
from lineplanner.quantities import Angle, Ratio


def _moments(low: Angle, high: Angle) -> tuple[float, float]:
    """Integrals of cos and of cos squared between two angles."""
    mean = math.sin(high) - math.sin(low)
    square = 0.5 * (high - low) + 0.25 * (math.sin(2.0 * high) - math.sin(2.0 * low))
    return mean, square


def _ripple_over(span: Angle, mean: float, square: float) -> Ratio:
    return math.sqrt(max(0.0, square * span / mean**2 - 1.0))


def firing_angle(voltage_share: Ratio, pulses: int) -> Angle:
    """Delay of firing that gives a share of the full output voltage.

        V/V0 = cos a                                  current never stops
        V/V0 = (1 - sin(a - pi/p)) / (2 sin(pi/p))    it stops once a pulse, a > pi/2 - pi/p

    Parameters
        voltage_share: V/V0, of the voltage at full phase-on, 0 to 1 [1]
        pulses: p, per period of the mains, at least 2
    Returns
        a [rad]
    Valid
        ideal valves, resistive load, no choke
    Source
        integral of max(0, cos) over one pulse, solved for the delay
    Example
        Six pulses at half of the volts, in degrees:

        >>> round(math.degrees(firing_angle(0.5, 6)), 6)
        60.0
    """
    share = min(1.0, max(0.0, voltage_share))
    half = math.pi / pulses
    if share >= math.cos(0.5 * math.pi - half):
        return math.acos(share)
    return half + math.asin(1.0 - 2.0 * share * math.sin(half))


def phase_control_ripple(voltage_share: Ratio, pulses: int) -> Ratio:
    """Ripple of a phase-controlled rectifier without filter when its volts are turned down.

        r = sqrt(V_rms^2 / V^2 - 1), v = max(0, cos) over [a - pi/p, a + pi/p]

    Parameters
        voltage_share: V/V0, of the voltage at full phase-on, above 0, at most 1 [1]
        pulses: p, per period of the mains, at least 2
    Returns
        r, rms of the alternating part over the mean [1]
    Valid
        ideal valves, resistive load: a unit with choke or filter has far less
    Source
        closed-form integral over one pulse
    Example
        Six pulses at 80 % of the volts, in percent:

        >>> round(100 * phase_control_ripple(0.8, 6), 1)
        23.5
    """
    angle, half = firing_angle(voltage_share, pulses), math.pi / pulses
    mean, square = _moments(angle - half, min(angle + half, 0.5 * math.pi))
    return _ripple_over(2.0 * half, mean, square)


def full_on_ripple(pulses: int) -> Ratio:
    """Ripple of an ideal rectifier at full output.

        r^2 = (1/2 + (p/4 pi) sin(2 pi/p)) / ((p/pi) sin(pi/p))^2 - 1

    Parameters
        pulses: p, per period of the mains, at least 2
    Returns
        r, rms of the alternating part over the mean [1]
    Valid
        ideal valves, no firing delay
    Source
        closed-form integral over one pulse
    Example
        A six-pulse bridge, in percent:

        >>> round(100 * full_on_ripple(6), 3)
        4.197
    """
    return phase_control_ripple(1.0, pulses)


def lost_line_voltage() -> Ratio:
    """Highest volts of a six-pulse bridge that has lost one mains line, against those of the sound one.

        V/V0 = (2/pi) / ((6/pi) sin(pi/6))

    Parameters
        none
    Returns
        V/V0 [1]
    Valid
        ideal bridge: what is left is a two-pulse bridge with twice the mains frequency
    Source
        mean of the two-pulse waveform over that of the six-pulse one
    Example
        >>> round(lost_line_voltage(), 4)
        0.6667
    """
    return (2.0 / math.pi) / ((6.0 / math.pi) * math.sin(math.pi / 6.0))


def open_arm_voltage() -> Ratio:
    """Highest volts of a six-pulse bridge with one valve open, against those of the sound one.

        V/V0 = (4 + 1) / 6: two of six pulses give half of theirs

    Parameters
        none
    Returns
        V/V0 [1]
    Valid
        ideal bridge, resistive load
    Source
        mean over one period: four pulses of cos over 60 degrees, one of |sin| over 120 degrees
    Example
        >>> round(open_arm_voltage(), 4)
        0.8333
    """
    whole, _ = _moments(-math.pi / 6.0, math.pi / 6.0)
    torn = 2.0 * (1.0 - math.cos(math.pi / 3.0))
    return (4.0 * whole + torn) / (6.0 * whole)


def open_arm_ripple() -> Ratio:
    """Ripple of a six-pulse bridge with one valve open, at full output.

        r = sqrt(V_rms^2 / V^2 - 1) over four pulses of cos and one of |sin| over 120 degrees

    Parameters
        none
    Returns
        r, rms of the alternating part over the mean [1]
    Valid
        ideal bridge, resistive load
    Source
        closed-form integral over one period of the mains
    Example
        In percent:

        >>> round(100 * open_arm_ripple(), 2)
        34.07
    """
    mean, square = _moments(-math.pi / 6.0, math.pi / 6.0)
    torn_mean = 2.0 * (1.0 - math.cos(math.pi / 3.0))
    torn_square = math.pi / 3.0 - 0.5 * math.sin(2.0 * math.pi / 3.0)
    return _ripple_over(2.0 * math.pi, 4.0 * mean + torn_mean, 4.0 * square + torn_square)


def rms_overreading(ripple: Ratio) -> Ratio:
    """How much a true-rms meter reads too high on a rippled current; a totalizer must not be fed by it.

        e = sqrt(1 + r^2) - 1

    Parameters
        ripple: r, rms of the alternating part over the mean [1]
    Returns
        e, over the mean [1]
    Valid
        any wave form
    Source
        definition of rms
    Example
        >>> round(rms_overreading(0.483), 4)
        0.1105
    """
    return math.sqrt(1.0 + ripple * ripple) - 1.0


def measured_ripple(curve: tuple[RipplePoint, ...], voltage_share: Ratio) -> Ratio | None:
    """Ripple from the rectifier's own measured points, straight between neighbours.

        r = r1 + (r2 - r1) (s - s1) / (s2 - s1)

    Parameters
        curve: measured points, in any order
        voltage_share: s, running volts over full volts [1]
    Returns
        r, rms over mean; None outside the measured points [1]
    Valid
        between the lowest and the highest measured point; never beyond
    Source
        linear interpolation
    Example
        >>> points = (RipplePoint(voltage_share=0.5, ripple=0.08), RipplePoint(voltage_share=1.0, ripple=0.02))
        >>> round(measured_ripple(points, 0.75), 6)
        0.05
    """
    points = sorted((p.voltage_share, p.ripple) for p in curve)
    for share, ripple in points:
        if share == voltage_share:
            return ripple
    for (low, first), (high, last) in pairwise(points):
        if low < voltage_share < high:
            return first + (last - first) * (voltage_share - low) / (high - low)
    return None
