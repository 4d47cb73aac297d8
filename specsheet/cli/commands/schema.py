"""Write the JSON schema of the tag file."""

from __future__ import annotations

import json
from argparse import Namespace

from specsheet import tagfile
from specsheet.cli.narrate import data
from specsheet.cli.status import Status


def run(arguments: Namespace) -> Status:
    """Write the schema, rendered from the glossary and the families' profiles."""
    del arguments
    data(json.dumps(tagfile.schema(), indent=2, ensure_ascii=False))
    return Status.FINE
