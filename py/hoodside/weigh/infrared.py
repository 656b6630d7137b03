"""Infrared bands and clear regions against one structure."""

from __future__ import annotations

from collections.abc import Iterator, Sequence

from hoodside.predict.infrared import region_of
from hoodside.predict.infrared.evidence import BandEvidence, weigh_bands, weigh_clear
from hoodside.predict.model import IrExpectation
from hoodside.readings import Readings
from hoodside.weigh.finding import Finding, Leftover, Link, Weighed
from hoodside.weigh.trust import trust

#: Bands under this wavenumber are the compound's own fingerprint, seldom read one by one, cm-1.
#: Bands nearer than this to their range are as expected, cm-1.
_BESIDE = 3.0
_FINGERPRINT = 1500.0
#: Missing bands that say less than this are passed over, decibans.
_WORTH_SAYING = -0.5


def weigh_infrared(expected: Sequence[IrExpectation], readings: Readings) -> Weighed:
    """All bands and clear regions of the readings against the expected bands of a structure."""
    bands = weigh_bands([b.cm1 for b in readings.ir], expected, [b.strength for b in readings.ir])
    clear = weigh_clear([(c.lo, c.hi) for c in readings.ir_clear], expected)
    bands = tuple(b for b in bands if b.reading >= 0 or (readings.ir and b.weight_db <= _WORTH_SAYING))
    findings = [*_bands(bands, readings), *_clear(clear, readings)]
    place = {id(e): i for i, e in enumerate(expected)}
    seen = [b for b in bands if b.reading >= 0 and b.expected is not None]
    return Weighed(
        tuple(findings),
        tuple(
            Link(f"ir:{b.reading}", f"ir:{place[id(b.expected)]}", b.expected.atoms)
            for b in seen
            if b.expected
        ),
        tuple(
            Leftover(
                f"ir:{place[id(b.expected)]}", _absent_text(b.expected), b.expected.group, b.expected.atoms
            )
            for b in bands
            if b.reading < 0 and b.expected
        ),
        tuple(
            Leftover(f"ir:{b.reading}", _stray_text(readings.ir[b.reading].cm1))
            for b in bands
            if b.reading >= 0 and b.expected is None and readings.ir[b.reading].cm1 >= _FINGERPRINT
        ),
    )


def _bands(evidence: Sequence[BandEvidence], readings: Readings) -> Iterator[Finding]:
    for entry in evidence:
        if entry.reading < 0 and entry.expected is not None:
            yield Finding(
                "ir.missing",
                trust("ir.missing") * entry.weight_db,
                _absent_text(entry.expected),
                (),
                entry.expected.atoms,
                entry.expected.source,
            )
            continue
        cm1 = readings.ir[entry.reading].cm1
        e = entry.expected
        text = _stray_text(cm1) if e is None else _seen_text(cm1, e)
        weight = trust("ir.band") * entry.weight_db
        yield Finding(
            "ir.band", weight, text, (f"ir:{entry.reading}",), e.atoms if e else (), e.source if e else ""
        )


def _clear(evidence: Sequence[BandEvidence], readings: Readings) -> Iterator[Finding]:
    """One finding per clear region: the bands that belong there are not independent, so the worst counts."""
    for i, stretch in enumerate(readings.ir_clear):
        entries = [e for e in evidence if e.reading == i]
        worst = min(entries, key=lambda e: e.weight_db, default=None)
        span = f"{stretch.hi:g} to {stretch.lo:g} cm⁻¹"
        if worst is None or worst.expected is None:
            yield Finding(
                "ir.clear", 0.0, f"Clear from {span}: the structure has nothing there.", (f"ir_clear:{i}",)
            )
            continue
        band = worst.expected
        yield Finding(
            "ir.clear",
            trust("ir.clear") * worst.weight_db,
            f"Clear from {span}, yet {band.group} should give a {band.strength} {band.mode} near "
            f"{band.typical:.0f} cm⁻¹.",
            (f"ir_clear:{i}",),
            band.atoms,
            band.source,
        )


def _seen_text(cm1: float, band: IrExpectation) -> str:
    off = max(band.lo - cm1, cm1 - band.hi)
    aside = f", {off:.0f} {'lower' if cm1 < band.lo else 'higher'}" if off >= _BESIDE else ""
    return (
        f"{cm1:.0f} cm⁻¹: {band.mode} of {band.group}, expected {band.lo:.0f} to {band.hi:.0f} cm⁻¹{aside}."
    )


def _stray_text(cm1: float) -> str:
    region = region_of(cm1)
    usual = f" (place of {region.name})" if region and cm1 >= _FINGERPRINT else ""
    return f"{cm1:.0f} cm⁻¹: no group of the structure is known for it{usual}."


def _absent_text(band: IrExpectation) -> str:
    return f"No band for {band.mode} of {band.group}, expected {band.lo:.0f} to {band.hi:.0f} cm⁻¹."
