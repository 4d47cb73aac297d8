"""Run the program as ``python -m specsheet``."""

import sys

from specsheet.cli import main

sys.exit(main())
