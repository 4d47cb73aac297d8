"""The lock of the room: state objects of the fluid library must not be used by two threads."""

from __future__ import annotations

import threading

LOCK = threading.RLock()
