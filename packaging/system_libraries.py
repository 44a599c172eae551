"""Which shared libraries of the system Qt lacks on Linux, and the packages that bring them; standard library only."""

from __future__ import annotations

import os
import shutil
import subprocess
import sys
from collections.abc import Iterable
from pathlib import Path

# Library -> package of Debian 12 and later. Ubuntu 24.04 renames a few (libglib2.0-0t64), and its apt-get
# understands the names below all the same.
PACKAGES = {
    "libEGL.so.1": "libegl1",
    "libGL.so.1": "libgl1",
    "libGLX.so.0": "libglx0",
    "libX11-xcb.so.1": "libx11-xcb1",
    "libX11.so.6": "libx11-6",
    "libdbus-1.so.3": "libdbus-1-3",
    "libfontconfig.so.1": "libfontconfig1",
    "libfreetype.so.6": "libfreetype6",
    "libglib-2.0.so.0": "libglib2.0-0",
    "libgthread-2.0.so.0": "libglib2.0-0",
    "libstdc++.so.6": "libstdc++6",
    "libwayland-client.so.0": "libwayland-client0",
    "libwayland-cursor.so.0": "libwayland-cursor0",
    "libwayland-egl.so.1": "libwayland-egl1",
    "libxcb-cursor.so.0": "libxcb-cursor0",
    "libxcb-glx.so.0": "libxcb-glx0",
    "libxcb-icccm.so.4": "libxcb-icccm4",
    "libxcb-image.so.0": "libxcb-image0",
    "libxcb-keysyms.so.1": "libxcb-keysyms1",
    "libxcb-randr.so.0": "libxcb-randr0",
    "libxcb-render-util.so.0": "libxcb-render-util0",
    "libxcb-render.so.0": "libxcb-render0",
    "libxcb-shape.so.0": "libxcb-shape0",
    "libxcb-shm.so.0": "libxcb-shm0",
    "libxcb-sync.so.1": "libxcb-sync1",
    "libxcb-util.so.1": "libxcb-util1",
    "libxcb-xfixes.so.0": "libxcb-xfixes0",
    "libxcb-xkb.so.1": "libxcb-xkb1",
    "libxcb.so.1": "libxcb1",
    "libxkbcommon-x11.so.0": "libxkbcommon-x11-0",
    "libxkbcommon.so.0": "libxkbcommon0",
    "libz.so.1": "zlib1g",
}


def is_debian() -> bool:
    """Tell whether this is Debian or one of its kin, such as Ubuntu."""
    return os.path.exists("/etc/debian_version") and shutil.which("apt-get") is not None


def lacking(environment: Path, platforms: Iterable[str]) -> list[str]:
    """Return the libraries that the loader does not find for Qt's widgets and these of its platform plugins.

    Empty on Windows and macOS, where Qt brings all it needs, and where there is no ``ldd`` to ask.
    """
    if not sys.platform.startswith("linux") or shutil.which("ldd") is None:
        return []
    names: set[str] = set()
    for qt in environment.glob("lib/python*/site-packages/PySide6"):
        files = [*qt.glob("QtWidgets.*.so")]
        files += [qt / "Qt" / "plugins" / "platforms" / f"libq{platform}.so" for platform in platforms]
        for file in files:
            names.update(_not_found(file))
    return sorted(names)


def packages_of(libraries: Iterable[str]) -> list[str]:
    """Return the packages that bring these libraries, each once; a library without a known package is left out."""
    return sorted({PACKAGES[name] for name in libraries if name in PACKAGES})


def _not_found(file: Path) -> list[str]:
    """Return the names that ``ldd`` marks as not found for one library file."""
    plain = {**os.environ, "LC_ALL": "C"}
    answer = subprocess.run(["ldd", str(file)], capture_output=True, text=True, env=plain)
    return [
        line.split("=>")[0].strip() for line in answer.stdout.splitlines() if line.rstrip().endswith("=> not found")
    ]
