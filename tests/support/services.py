"""Invented services, one a line of process data, to hold meter families against."""

from specsheet import tagfile
from specsheet.tag import Tag

_WATER = 'kind = "substance"\nsubstance = "water"\nphase = "liquid"\n'
_AIR = 'kind = "substance"\nsubstance = "air"\nphase = "gas"\n'


def _given(density: str, viscosity: str) -> str:
    return f'density = "{density}"\nviscosity = "{viscosity}"\nvapour_pressure = "0.1 kPa(a)"\n'


#: name -> [fluid], [line], flows (minimum, normal, maximum), entries of every point
SERVICES: dict[str, tuple[str, str, tuple[str, str, str], str]] = {
    "water": (
        _WATER + 'electrical_conductivity = "500 uS/cm"\nsolids = "0 %"\nbubbles = "0 %"\n',
        'size = "DN 100"\nupstream_length = "60 D"\ndownstream_length = "15 D"\n',
        ("25 m3/h", "50 m3/h", "80 m3/h"),
        'pressure = "6 bar(g)"\ntemperature = "15 degC"\n',
    ),
    "house water": (
        _WATER + 'solids = "0 %"\nbubbles = "0 %"\n',
        'size = "DN 25"\nschedule = "40"\nupstream_length = "60 D"\ndownstream_length = "15 D"\n',
        ("0.5 m3/h", "2 m3/h", "4 m3/h"),
        'pressure = "5 bar(g)"\ntemperature = "15 degC"\n',
    ),
    "dosing water": (
        _WATER + 'solids = "0 %"\nbubbles = "0 %"\n',
        'size = "DN 15"\nschedule = "40"\nupstream_length = "60 D"\ndownstream_length = "15 D"\n',
        ("0.06 m3/h", "0.2 m3/h", "0.4 m3/h"),
        'pressure = "5 bar(g)"\ntemperature = "15 degC"\n',
    ),
    "boiling water": (
        _WATER,
        'size = "DN 100"\nupstream_length = "60 D"\ndownstream_length = "15 D"\n',
        ("25 m3/h", "50 m3/h", "80 m3/h"),
        'pressure = "3.02 bar(a)"\ntemperature = "133.5 degC"\n',
    ),
    "bubbly water": (
        _WATER + 'bubbles = "5 %"\nsolids = "0 %"\nelectrical_conductivity = "500 uS/cm"\n',
        'size = "DN 100"\nupstream_length = "60 D"\ndownstream_length = "15 D"\n',
        ("25 m3/h", "50 m3/h", "80 m3/h"),
        'pressure = "6 bar(g)"\ntemperature = "15 degC"\n',
    ),
    "sludge": (
        'kind = "slurry"\nsubstance = "water"\nphase = "liquid"\nsolids = "4 %"\n'
        'solids_density = "1400 kg/m3"\nabrasive = true\nelectrical_conductivity = "1200 uS/cm"\n',
        'size = "DN 100"\nupstream_length = "60 D"\ndownstream_length = "15 D"\n',
        ("30 m3/h", "50 m3/h", "80 m3/h"),
        'pressure = "4 bar(g)"\ntemperature = "15 degC"\nviscosity = "10 mPa s"\n',
    ),
    "fuel oil": (
        'kind = "given"\nphase = "liquid"\nsolids = "0 %"\nbubbles = "0 %"\n',
        'size = "DN 80"\nupstream_length = "60 D"\ndownstream_length = "15 D"\n',
        ("10 m3/h", "20 m3/h", "40 m3/h"),
        'pressure = "6 bar(g)"\ntemperature = "40 degC"\n' + _given("870 kg/m3", "10 mPa s"),
    ),
    "burner oil": (
        'kind = "given"\nphase = "liquid"\nsolids = "0 %"\nbubbles = "0 %"\n',
        'size = "DN 25"\nschedule = "40"\nupstream_length = "60 D"\ndownstream_length = "15 D"\n',
        ("0.2 m3/h", "0.5 m3/h", "1 m3/h"),
        'pressure = "6 bar(g)"\ntemperature = "40 degC"\n' + _given("870 kg/m3", "10 mPa s"),
    ),
    "bitumen": (
        'kind = "given"\nphase = "liquid"\nsolids = "0 %"\nbubbles = "0 %"\n',
        'size = "DN 100"\nupstream_length = "60 D"\ndownstream_length = "15 D"\n',
        ("5 m3/h", "10 m3/h", "15 m3/h"),
        'pressure = "10 bar(g)"\ntemperature = "140 degC"\n' + _given("970 kg/m3", "900 mPa s"),
    ),
    "sodium": (
        'kind = "given"\nphase = "liquid"\nelectrical_conductivity = "6000000 S/m"\n',
        'size = "DN 50"\nupstream_length = "60 D"\ndownstream_length = "15 D"\n',
        ("5 m3/h", "10 m3/h", "15 m3/h"),
        'pressure = "2 bar(g)"\ntemperature = "300 degC"\n' + _given("880 kg/m3", "0.35 mPa s"),
    ),
    "compressed air": (
        _AIR,
        'size = "DN 100"\nupstream_length = "60 D"\ndownstream_length = "15 D"\n',
        ("250 m3/h", "400 m3/h", "600 m3/h"),
        'pressure = "6 bar(g)"\ntemperature = "25 degC"\n',
    ),
    "tool air": (
        _AIR,
        'size = "DN 25"\nschedule = "40"\nupstream_length = "60 D"\ndownstream_length = "15 D"\n',
        ("4 m3/h", "10 m3/h", "20 m3/h"),
        'pressure = "6 bar(g)"\ntemperature = "25 degC"\n',
    ),
    "purge air": (
        _AIR,
        'size = "DN 15"\nschedule = "40"\nupstream_length = "60 D"\ndownstream_length = "15 D"\n',
        ("0.1 m3/h", "0.3 m3/h", "0.5 m3/h"),
        'pressure = "0.5 bar(g)"\ntemperature = "25 degC"\n',
    ),
    "duct": (
        _AIR,
        'inside_diameter = "400 mm"\nupstream_length = "20 D"\ndownstream_length = "10 D"\n',
        ("2000 m3/h", "4000 m3/h", "6000 m3/h"),
        'pressure = "5 mbar(g)"\ntemperature = "25 degC"\n',
    ),
    "engine intake": (
        _AIR,
        'size = "DN 80"\nupstream_length = "20 D"\ndownstream_length = "10 D"\n',
        ("60 kg/h", "150 kg/h", "300 kg/h"),
        'pressure = "0 bar(g)"\ntemperature = "25 degC"\n',
    ),
    "flare": (
        _AIR,
        'size = "DN 150"\nupstream_length = "60 D"\ndownstream_length = "15 D"\n',
        ("400 m3/h", "5000 m3/h", "16000 m3/h"),
        'pressure = "0.05 bar(g)"\ntemperature = "25 degC"\n',
    ),
    "heating gas": (
        'kind = "substance"\nsubstance = "methane"\nphase = "gas"\n',
        'size = "DN 50"\nupstream_length = "20 D"\ndownstream_length = "10 D"\n',
        ("2 m3/h", "10 m3/h", "25 m3/h"),
        'pressure = "25 mbar(g)"\ntemperature = "15 degC"\n',
    ),
    "works gas": (
        'kind = "substance"\nsubstance = "methane"\nphase = "gas"\n',
        'size = "DN 80"\nupstream_length = "20 D"\ndownstream_length = "10 D"\n',
        ("20 m3/h", "80 m3/h", "160 m3/h"),
        'pressure = "4 bar(g)"\ntemperature = "15 degC"\n',
    ),
    "steam": (
        'kind = "substance"\nsubstance = "water"\nphase = "gas"\n',
        'size = "DN 150"\nupstream_length = "60 D"\ndownstream_length = "15 D"\n',
        ("2 t/h", "3.1 t/h", "3.9 t/h"),
        'pressure = "7 bar(g)"\ntemperature = "185 degC"\n',
    ),
    "cooling water": (
        _WATER + 'electrical_conductivity = "800 uS/cm"\nsolids = "0 %"\nbubbles = "0 %"\n',
        'size = "DN 300"\nupstream_length = "20 D"\ndownstream_length = "5 D"\n',
        ("250 m3/h", "500 m3/h", "700 m3/h"),
        'pressure = "4 bar(g)"\ntemperature = "28 degC"\n',
    ),
    "demineralised water": (
        _WATER + 'electrical_conductivity = "0.2 uS/cm"\nsolids = "0 %"\nbubbles = "0 %"\n',
        'size = "DN 50"\nupstream_length = "20 D"\ndownstream_length = "5 D"\n',
        ("5 m3/h", "10 m3/h", "15 m3/h"),
        'pressure = "6 bar(g)"\ntemperature = "25 degC"\n',
    ),
    "seawater": (
        'kind = "seawater"\nphase = "liquid"\nsalinity = "35 g/kg"\n'
        'electrical_conductivity = "50 mS/cm"\nsolids = "0 %"\nbubbles = "0 %"\n',
        'size = "DN 400"\nupstream_length = "20 D"\ndownstream_length = "5 D"\n',
        ("500 m3/h", "900 m3/h", "1200 m3/h"),
        'pressure = "3 bar(g)"\ntemperature = "12 degC"\n',
    ),
    "caustic": (
        'kind = "solution"\nsolute = "sodium hydroxide"\nmass_fraction = "20 %"\n'
        'phase = "liquid"\nelectrical_conductivity = "300 mS/cm"\nph = 14\n'
        'solids = "0 %"\nbubbles = "0 %"\nhazards = ["corrosive"]\n',
        'size = "DN 50"\nupstream_length = "20 D"\ndownstream_length = "5 D"\n',
        ("4 m3/h", "8 m3/h", "12 m3/h"),
        'pressure = "5 bar(g)"\ntemperature = "30 degC"\n',
    ),
    "digestate": (
        'kind = "slurry"\nsubstance = "water"\nphase = "liquid"\nsolids = "5 %"\n'
        'solids_density = "1300 kg/m3"\nelectrical_conductivity = "9 mS/cm"\n',
        'size = "DN 150"\nupstream_length = "20 D"\ndownstream_length = "5 D"\n',
        ("30 m3/h", "60 m3/h", "90 m3/h"),
        'pressure = "3 bar(g)"\ntemperature = "39 degC"\nviscosity = "60 mPa s"\n',
    ),
    "biogas": (
        'kind = "mixture"\nphase = "gas"\n'
        "mixture = { methane = 0.58, carbon_dioxide = 0.38, water = 0.04 }\n",
        'size = "DN 150"\nupstream_length = "20 D"\ndownstream_length = "5 D"\n',
        ("80 m3/h", "250 m3/h", "350 m3/h"),
        'pressure = "40 mbar(g)"\ntemperature = "38 degC"\n',
    ),
    "natural gas": (
        'kind = "mixture"\nphase = "gas"\n'
        "mixture = { methane = 0.93, ethane = 0.04, nitrogen = 0.02, carbon_dioxide = 0.01 }\n",
        'size = "DN 200"\nupstream_length = "20 D"\ndownstream_length = "5 D"\n',
        ("200 m3/h", "900 m3/h", "1400 m3/h"),
        'pressure = "45 bar(g)"\ntemperature = "10 degC"\n',
    ),
    "oxygen": (
        'kind = "substance"\nsubstance = "oxygen"\nphase = "gas"\n',
        'size = "DN 80"\nupstream_length = "20 D"\ndownstream_length = "5 D"\n',
        ("50 m3/h", "120 m3/h", "200 m3/h"),
        'pressure = "15 bar(g)"\ntemperature = "20 degC"\n',
    ),
    "insulating oil": (
        'kind = "petroleum"\nphase = "liquid"\nproduct = "lubricating oil"\n'
        'solids = "0 %"\nbubbles = "0 %"\n',
        'size = "DN 80"\nupstream_length = "20 D"\ndownstream_length = "5 D"\n',
        ("10 m3/h", "20 m3/h", "40 m3/h"),
        'pressure = "4 bar(g)"\ntemperature = "40 degC"\n'
        'density = "870 kg/m3"\nviscosity = "10 mPa s"\nvapour_pressure = "0.1 kPa(a)"\n',
    ),
    "brook": (
        _WATER + 'solids = "0.05 %"\n',
        "",
        ("20 m3/h", "60 m3/h", "200 m3/h"),
        'pressure = "0 bar(g)"\ntemperature = "10 degC"\n',
    ),
    "canal": (
        _WATER + 'solids = "0.05 %"\n',
        "",
        ("400 m3/h", "1000 m3/h", "2000 m3/h"),
        'pressure = "0 bar(g)"\ntemperature = "10 degC"\n',
    ),
    "penstock": (
        _WATER,
        'inside_diameter = "1000 mm"\nupstream_length = "60 D"\ndownstream_length = "15 D"\n',
        ("3000 m3/h", "5000 m3/h", "8000 m3/h"),
        'pressure = "6 bar(g)"\ntemperature = "10 degC"\n',
    ),
}


def service_text(name: str, family: str = "vortex") -> str:
    """Return the tag file of a service, as a user would write it."""
    fluid, line, flows, conditions = SERVICES[name]
    points = "".join(
        f'[[points]]\nname = "{point}"\nflow = "{flow}"\n{conditions}'
        for point, flow in zip(("minimum", "normal", "maximum"), flows, strict=True)
    )
    head = f'schema = 1\ntag = "FT-1"\nfamily = "{family}"\n'
    return f"{head}[fluid]\n{fluid}[line]\n{line}{points}"


def service(name: str, family: str = "vortex") -> Tag:
    """Return the tag of a service."""
    reading = tagfile.loads(service_text(name, family))
    assert reading.tag is not None
    assert not reading.problems, [str(problem) for problem in reading.problems]
    return reading.tag
