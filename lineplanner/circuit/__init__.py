"""Resistance and drop of bus, joints, bar, rack and contacts, from line and load."""

from lineplanner.circuit.elements import Circuit, Element, circuit_of

__all__ = ["Circuit", "Element", "circuit_of"]
