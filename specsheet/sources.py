"""The one bibliography: every standard, release, book or practice that a number can cite.

``basis`` is honest about how the project knows it:

* ``published values``: figures of the source, or of public material quoting it, are in the tests;
* ``read``: the passage used was read in public material;
* ``memory``: written from memory; the citation then says so wherever it is printed.
"""

from __future__ import annotations

from dataclasses import dataclass

PRACTICE = "common practice, no source"
MEMORY = "from memory"


@dataclass(frozen=True, slots=True)
class Source:
    """One entry of the bibliography.

    Attributes:
        key: short name used in code and profiles.
        name: standard or author with edition ("ISO 5167-2:2003").
        title: what it is about.
        basis: "published values", "read" or "memory" (see the module text).
    """

    key: str
    name: str
    title: str
    basis: str = "memory"


_SOURCES = (
    # Differential-pressure metering
    Source("iso5167-1", "ISO 5167-1:2003", "differential-pressure devices: general principles"),
    Source("iso5167-2", "ISO 5167-2:2003", "orifice plates", "published values"),
    Source("iso5167-3", "ISO 5167-3:2003", "nozzles and Venturi nozzles", "published values"),
    Source("iso5167-4", "ISO 5167-4:2003", "Venturi tubes", "published values"),
    Source("iso5167-5", "ISO 5167-5:2016", "cone meters", "published values"),
    Source("iso5167-6", "ISO 5167-6:2019", "wedge meters", "published values"),
    Source("isotr15377", "ISO/TR 15377:1998", "plates beyond ISO 5167", "published values"),
    Source("isotr9464", "ISO/TR 9464:2008", "guidelines for the use of ISO 5167:2003"),
    Source("isotr11583", "ISO/TR 11583:2012", "wet gas, Venturi and plate", "published values"),
    Source("iso9300", "ISO 9300:2005", "critical flow Venturi nozzles"),
    Source("iso3966", "ISO 3966:2008", "Pitot static tubes", "published values"),
    Source("iso5802", "ISO 5802:2001", "fans: tests in situ, traverses", "published values"),
    Source("vdi3513", "VDI/VDE 3513-1", "variable-area meters"),
    Source("miller", "Miller, Flow Measurement Engineering Handbook, 3rd ed.", "segmental plates"),
    # Meters that oscillate, induce, twist or turn
    Source("iso12764", "ISO/TR 12764:1997", "vortex meters", "published values"),
    Source("iso20456", "ISO 20456:2017", "electromagnetic meters", "published values"),
    Source("iso10790", "ISO 10790:2015", "Coriolis meters"),
    Source("mpms5.3", "API MPMS 5.3", "turbine meters: back pressure", "published values"),
    Source("iso12242", "ISO 12242:2012", "ultrasonic transit-time meters for liquid"),
    Source("iso17089", "ISO 17089-1:2019", "ultrasonic meters for gas"),
    Source("iso9951", "ISO 9951:1993", "turbine gas meters"),
    Source("iso14511", "ISO 14511:2001", "thermal mass flowmeters"),
    Source("isa75.23", "ISA-RP75.23", "control valves: cavitation index"),
    # Pipes, flanges, materials and hazards
    Source("asme-b36.10", "ASME B36.10M-2004", "steel pipe: dimensions", "published values"),
    Source("asme-b36.19", "ASME B36.19M-2004", "stainless pipe: dimensions", "published values"),
    Source("en10220", "EN 10220", "steel tubes: dimensions"),
    Source("asme-b16.5", "ASME B16.5", "pipe flanges: ratings", "published values"),
    Source("asme-b16.47", "ASME B16.47", "large flanges"),
    Source("en1092-1", "EN 1092-1", "flanges, PN designated: ratings"),
    Source("en10088-1", "EN 10088-1", "stainless steels: thermal expansion", "read"),
    Source("asme-2d", "ASME BPVC II-D", "thermal expansion of metals"),
    Source("asme-b31.3", "ASME B31.3", "process piping: low temperature"),
    Source("iso15156-2", "ISO 15156-2", "sour service: carbon steel", "published values"),
    Source("iso15156-3", "ISO 15156-3", "sour service: corrosion-resistant alloys"),
    Source("iso23936-2", "ISO 23936-2", "elastomers in gas under pressure"),
    Source("iec60079-0", "IEC 60079-0", "explosive atmospheres: temperature classes"),
    Source("iec60079-20", "IEC 60079-20-1:2010", "ignition temperatures", "published values"),
    Source("eiga13", "EIGA Doc 13", "oxygen pipelines: velocity and materials"),
    Source("astm-g88", "ASTM G88", "oxygen systems: design"),
    Source("astm-g63", "ASTM G63", "oxygen: choice of polymers"),
    Source("api941", "API RP 941", "steels in hot hydrogen"),
    Source("sp0403", "NACE SP0403", "carbon steel in caustic"),
    # Uncertainty
    Source("iso5168", "ISO 5168:2005", "flow measurement: evaluation of uncertainties"),
    Source("gum", "JCGM 100:2008", "guide to the expression of uncertainty", "published values"),
    # Properties of fluids
    Source("iapws-if97", "IAPWS-IF97 (2007)", "water and steam for industry", "published values"),
    Source("iapws-r12-08", "IAPWS R12-08", "viscosity of water", "published values"),
    Source("iapws-r15-11", "IAPWS R15-11", "thermal conductivity of water", "published values"),
    Source("coolprop", "CoolProp 8.0.0", "reference equations of state", "published values"),
    Source("iso20765-2", "ISO 20765-2:2015", "natural gas: GERG-2008", "published values"),
    Source("iso6976", "ISO 6976:2016", "calorific values from composition", "published values"),
    Source("wilke", "Wilke (1950)", "viscosity of gas mixtures", "read"),
    Source("perry8", "Perry's Handbook, 8th edition", "data of substances", "read"),
    Source("wilson", "Wilson (1968)", "vapour-liquid ratios from critical constants"),
    Source("mason-saxena", "Mason and Saxena (1958)", "thermal conductivity of gas mixtures"),
    Source("grunberg", "Grunberg and Nissan (1949)", "viscosity of liquid mixtures"),
    Source("melinder", "Melinder (2010)", "properties of secondary fluids", "published values"),
    Source("laliberte", "Laliberté and Cooper (2004, 2007, 2009)", "aqueous solutions", "read"),
    Source("iapws-r13-08", "IAPWS R13-08", "seawater", "published values"),
    Source("sharqawy", "Sharqawy and others (2010)", "viscosity of seawater"),
    Source("iso91", "ISO 91:2017", "petroleum: volume correction (API MPMS 11.1)"),
    Source("astm-d341", "ASTM D341", "petroleum: viscosity over temperature", "read"),
    Source("thomas", "Thomas (1965)", "viscosity of suspensions"),
    Source("cragoe", "Cragoe (1929)", "heat capacity of petroleum"),
    Source("yoon-thodos", "Yoon and Thodos (1970)", "viscosity of gases", "published values"),
    # Base conditions
    Source("din1343", "DIN 1343:1990", "reference condition 0 degC, 101.325 kPa"),
)

SOURCES: dict[str, Source] = {source.key: source for source in _SOURCES}


def cite(key: str, clause: str = "") -> str:
    """Return the printed citation of a source, with its clause.

    Raises:
        KeyError: the bibliography has no such key (a mistake of ours, not of the user).
    """
    source = SOURCES[key]
    text = f"{source.name}, {clause}" if clause else source.name
    return f"{text} ({MEMORY})" if source.basis == "memory" else text
