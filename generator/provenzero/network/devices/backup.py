"""Nitrogen backup: high-pressure bottles that can drive a pressure line."""

from provenzero.network.builder import Builder, way
from provenzero.network.devices.runs import run
from provenzero.network.model import DeviceKind, LineId, Medium, Source, SourceKind
from provenzero.unit.model import NitrogenBackup


def backup(builder: Builder, item: NitrogenBackup) -> None:
    """Compile one set of backup bottles."""
    gas = builder.line(
        f"{item.tag}.gas",
        f"nitrogen backup {item.tag}",
        Medium.NITROGEN,
        volume_m3=item.bottles * item.bottle_volume_m3,
    )
    target = LineId(item.delivers_to)
    met = run(
        builder,
        item.run,
        start=gas,
        end=target,
        prefix=f"{item.tag}.line",
        words=f"nitrogen backup {item.tag}",
        medium=Medium.NITROGEN,
    )
    if len(met) == 1:
        builder.fixed(f"{item.tag}-piping", DeviceKind.PIPING, f"pipe of {item.tag}", item.location, way(gas, target))
    builder.sources.append(
        Source(
            id=item.tag,
            name=f"nitrogen backup {item.tag}",
            line=gas,
            kind=SourceKind.STORED,
            low_pag=item.pressure_pag,
            pressure_pag=item.pressure_pag,
            gas=True,
        )
    )
    builder.charged_pag[gas] = (item.pressure_pag, item.pressure_pag)
    builder.port(item.tag, "gas", gas)
    builder.port(item.tag, "outlet", met[-2] if len(met) > 1 else target)
