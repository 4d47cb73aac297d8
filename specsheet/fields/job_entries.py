"""Entries of the revision block and of the job (``job.toml``)."""

from __future__ import annotations

from specsheet.fields.entry import Entry

_ALWAYS = "always"

REVISION: tuple[Entry, ...] = (
    Entry("revisions.mark", "Mark", "text", "Mark of the revision.", "A", needed=_ALWAYS),
    Entry("revisions.date", "Date", "date", "Date of the revision.", "2031-03-04", needed=_ALWAYS),
    Entry("revisions.text", "Text", "text", "What changed.", "Issued for inquiry"),
    Entry("revisions.by", "By", "text", "Initials of the author.", "KL"),
    Entry("revisions.checked", "Checked", "text", "Initials of the checker.", "MT"),
    Entry("revisions.approved", "Approved", "text", "Initials of the approver.", "OR"),
)

#: entries of ``job.toml``; paths start with "job." inside the program, not in the file
JOB: tuple[Entry, ...] = (
    Entry("job.schema", "Schema", "integer", "Version of the file format.", "1", needed=_ALWAYS),
    Entry("job.title", "Job", "text", "Name of the job.", "Heat station renewal"),
    Entry("job.number", "Job number", "text", "Number of the job.", "J-118"),
    Entry("job.client", "Client", "text", "Who buys.", "Tidal Island Works"),
    Entry("job.site", "Site", "text", "Where it goes.", "North quay"),
    Entry("job.author", "Author", "text", "Office that writes the sheets.", ""),
    Entry("job.confidentiality", "Confidentiality", "text", "Line printed at the foot.", ""),
    Entry(
        "job.atmospheric_pressure",
        "Atmospheric pressure",
        "pressure_absolute",
        "Of the site; or state the altitude.",
        "1.00 bar(a)",
        default="1.01325 bar(a)",
    ),
    Entry(
        "job.altitude",
        "Altitude",
        "elevation",
        "Of the site above the sea: gives the atmospheric pressure when that is not stated.",
        "320 m",
    ),
    Entry(
        "job.paper",
        "Paper",
        "choice",
        "Size of the printed sheet.",
        "A4",
        choices=("A4", "Letter"),
        default="A4",
    ),
    Entry(
        "job.base.temperature",
        "Base temperature",
        "temperature",
        "Of the job's own base condition (unit m3/h(base)).",
        "15 degC",
        default="15 degC",
    ),
    Entry(
        "job.base.pressure",
        "Base pressure",
        "pressure_absolute",
        "Of the job's own base condition.",
        "101.325 kPa(a)",
        default="101.325 kPa(a)",
    ),
    Entry(
        "job.combustion_temperature",
        "Combustion temperature",
        "temperature",
        "Reference temperature of combustion for calorific values.",
        "15 degC",
        default="15 degC",
    ),
    Entry(
        "job.energy_price",
        "Price of energy",
        "money_rate",
        "In the job's currency, for the yearly cost of pressure loss.",
        "0.11 1/kWh",
    ),
    Entry("job.currency", "Currency", "text", "Of prices.", "EUR"),
    Entry(
        "job.hours_per_year",
        "Hours a year",
        "dimensionless",
        "That the meter runs.",
        "8000",
        default="8000",
    ),
    Entry(
        "job.efficiency",
        "Efficiency of pump or compressor",
        "ratio",
        "For the yearly cost of pressure loss.",
        "70 %",
        default="70 %",
    ),
    Entry(
        "job.units",
        "Shown units",
        "units",
        "Unit shown for a kind of quantity.",
        '{ mass_flow = "t/h" }',
    ),
    Entry(
        "job.velocity_limits",
        "House limits",
        "fractions",
        "Largest velocity the house allows, in m/s: liquid, gas, steam.",
        "{ liquid = 3.0, gas = 25, steam = 40 }",
    ),
)
