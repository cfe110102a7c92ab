"""How fast chrome grows in a bath: efficiency, rate, and the mean over a ramp."""

from dataclasses import dataclass

from lineplanner.bath.efficiency import current_efficiency, deposit_rate, deposition_threshold
from lineplanner.inputs.bath import Bath
from lineplanner.inputs.tables import ChromeFamily
from lineplanner.quantities import (
    CURRENT_DENSITY,
    RATIO,
    THICKNESS,
    TIME,
    CurrentDensity,
    Rate,
    Ratio,
    Temperature,
    Thickness,
    Time,
)
from lineplanner.sources import Source, Status
from lineplanner.trace import Figure, given, result

# Gauss-Legendre points and weights on 0..1, five points: exact to the ninth degree (any handbook of mathematics).
_NODES = (0.046910077030668, 0.230765344947158, 0.5, 0.769234655052842, 0.953089922969332)
_WEIGHTS = (0.118463442528095, 0.239314335249683, 0.284444444444444, 0.239314335249683, 0.118463442528095)
_PANELS = 8


@dataclass(frozen=True, slots=True, kw_only=True)
class Deposition:
    """The deposit of one bath at its temperature; calibration is 1 without coupons."""

    family: ChromeFamily
    temperature: Temperature
    chromic_acid: float
    calibration: Ratio
    calibrated: bool
    figure: Figure | None = None

    @property
    def threshold(self) -> CurrentDensity:
        return deposition_threshold(self.temperature, self.family)

    def efficiency(self, density: CurrentDensity) -> Ratio:
        return current_efficiency(
            current_density=density,
            temperature=self.temperature,
            chromic_acid=self.chromic_acid,
            family=self.family,
            calibration=self.calibration,
        )

    def rate(self, density: CurrentDensity) -> Rate:
        return deposit_rate(
            current_density=density,
            efficiency=self.efficiency(density),
            deposit_density=self.family.deposit_density.value,
        )

    def story(self, density: CurrentDensity) -> Figure:
        """The efficiency at a density, as a figure."""
        family = self.family
        rows = (
            ("efficiency at the reference condition", family.reference_efficiency, RATIO),
            ("ceiling of the efficiency", family.cap, RATIO),
            ("onset of deposition at the reference temperature", family.threshold, CURRENT_DENSITY),
            ("relative loss by chromic acid", family.acid_slope, RATIO),
        )
        inputs = [given(label, row.value, kind, row.origin) for label, row, kind in rows]
        if self.figure is not None:
            inputs.append(self.figure)
        return result(
            "current efficiency",
            self.efficiency(density),
            RATIO,
            "efficiency of the bath family at this current density, temperature and chromic acid",
            "eta = k min(cap, eta0 g(i, T)/g0 (1 - a (c - c0)))",
            family.reference_efficiency.origin,
            *inputs,
        )

    def over_ramp(self, start: CurrentDensity, end: CurrentDensity, time: Time) -> Thickness:
        """Deposit over a linear change of current density; the onset splits the integral, it has a kink there."""
        if time <= 0.0:
            return 0.0
        if abs(end - start) <= 1e-12 * max(end, start):
            return self.rate(end) * time
        low, high = min(start, end), max(start, end)
        from_onset = max(low, min(self.threshold, high))
        mean = self._integral(from_onset, high) / (high - low)
        return mean * time

    def _integral(self, low: CurrentDensity, high: CurrentDensity) -> float:
        width = (high - low) / _PANELS
        return width * sum(
            weight * self.rate(low + (panel + node) * width)
            for panel in range(_PANELS)
            for node, weight in zip(_NODES, _WEIGHTS, strict=True)
        )


def deposition_of(
    bath: Bath, families: tuple[ChromeFamily, ...], substrates: tuple[str, ...] = ()
) -> Deposition:
    """The deposition of a chrome bath, calibrated by its coupons (mean of measured over predicted)."""
    family = next(f for f in families if f.name == bath.family)
    assert bath.chromic_acid is not None  # the bath's rules ask for it
    plain = Deposition(
        family=family,
        temperature=bath.temperature,
        chromic_acid=bath.chromic_acid,
        calibration=1.0,
        calibrated=False,
    )
    coupons = [c for c in bath.coupons if not substrates or c.base in substrates or c.base == "any"]
    ratios = []
    for coupon in coupons:
        there = Deposition(
            family=family,
            temperature=coupon.temperature,
            chromic_acid=bath.chromic_acid,
            calibration=1.0,
            calibrated=False,
        )
        ratios.append(coupon.thickness / (there.rate(coupon.current_density) * coupon.time))
    calibration = sum(ratios) / len(ratios) if ratios else 1.0
    figures = tuple(
        figure
        for c in coupons
        for origin in [Source(f"coupon, {c.measured_by}", Status.MEASURED)]
        for figure in (
            given("coupon thickness", c.thickness, THICKNESS, origin),
            given("coupon current density", c.current_density, CURRENT_DENSITY, origin),
            given("coupon time", c.time, TIME, origin),
        )
    )
    source = Source("measured over predicted deposit, mean of the coupons", Status.MEASURED)
    figure = (
        result(
            "coupon factor", calibration, RATIO, "measured / predicted", "k = h / h_model", source, *figures
        )
        if ratios
        else None
    )
    return Deposition(
        family=family,
        temperature=plain.temperature,
        chromic_acid=plain.chromic_acid,
        calibration=calibration,
        calibrated=bool(ratios),
        figure=figure,
    )
