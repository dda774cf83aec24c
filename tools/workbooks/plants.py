"""The invented plants whose workbooks these are, and their numbers."""
import random
from datetime import datetime, timedelta


def channel(number, name, unit, aliases, **nominals):
    """`nominals`: by product, the nominal value and the distance of the specification limits from it."""
    specifications = [
        {"product": product.replace("_", "-"), "nominal": nominal, "lower": round(nominal - span, 6), "upper": round(nominal + span, 6)}
        for product, (nominal, span) in nominals.items()
    ]
    return {"id": number, "name": name, "aliases": aliases, "unit": unit, "specifications": specifications}


CW = channel(11, "Coat weight", "g/m²", ["BG-201", "CW", "Flächengewicht"], SEP_12=(12.0, 0.6), SEP_16=(14.5, 0.7))
WT = channel(12, "Web thickness", "µm", ["LS-305", "Bahndicke"], SEP_12=(16.4, 0.8), SEP_16=(20.5, 1.0))
OT = channel(13, "Oven exit temperature", "°C", ["TC-118", "Ofentemperatur"], SEP_12=(84.0, 3.0), SEP_16=(88.0, 3.0))
CT = channel(21, "Thickness", "µm", ["LS-410", "Dicke"], SEP_12=(12.2, 0.5))
NF = channel(22, "Nip force", "kN", ["LC-077", "Liniendruck"], SEP_12=(42.0, 4.0))
EO = channel(23, "Edge offset", "mm", ["EG-044"], SEP_12=(0.0, 2.0))
VI = channel(31, "Viscosity", "mPa·s", ["VM-512", "Viskosität"], S_4=(4250.0, 400.0))
PH = channel(32, "pH", "", ["PH-033", "pH-Wert"], S_4=(8.2, 0.4))
DE = channel(33, "Density", "kg/m³", ["DM-208", "Dichte"], S_4=(1412.0, 25.0))
SO = channel(34, "Solids", "%", ["SC-090", "Feststoff"], S_4=(48.0, 1.5))

FILM = [{"code": "SEP-12", "name": "Separator 12 µm"}, {"code": "SEP-16", "name": "Separator 16 µm"}]


def plant(zone, now, channels, products=FILM):
    return {"timeZone": zone, "now": now, "channels": channels, "products": products}


NOW = "2026-03-06T12:00:00Z"
COATER = plant("Europe/Berlin", NOW, [CW, WT, OT])
CALENDER = plant("Europe/Berlin", NOW, [CT, NF, EO])
SLURRY = plant("Europe/Berlin", NOW, [VI, PH, DE, SO], [{"code": "S-4", "name": "Ceramic slurry 4"}])
#: A sister plant on the other side of the ocean.
TANSLEY = plant("America/New_York", NOW, [CW, WT, OT])


def at(text):
    """A wall clock of the plant."""
    return datetime.fromisoformat(text)


def every(start, minutes, count):
    return [at(start) + timedelta(minutes=minutes * step) for step in range(count)]


def series(name, channel, count, product="SEP-12", digits=2):
    """Invented readings near the nominal value, the same at every run."""
    spec = next(one for one in channel["specifications"] if one["product"] == product)
    draw = random.Random(f"{name} {channel['name']}")
    spread = (spec["upper"] - spec["nominal"]) / 4
    return [round(spec["nominal"] + draw.uniform(-spread, spread) + spread * step / count, digits) for step in range(count)]
