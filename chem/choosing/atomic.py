"""Files that appear whole or not at all."""

from __future__ import annotations

import os
import tempfile
from collections.abc import Sequence
from contextlib import suppress
from pathlib import Path

from stillroom.chem.data.errors import CannotWrite


def write_files(files: Sequence[tuple[Path, bytes]], *, overwrite: bool = False) -> None:
    """Write several files, each whole: to a temporary file beside it, to the disk, then renamed.

    All temporary files are complete before the first is renamed, so a full disk changes nothing.

    Raises
    ------
    CannotWrite
        If one exists and `overwrite` is false, or the folder or disk does not take it.
    """
    waiting: list[tuple[str, Path]] = []
    try:
        for path, content in files:
            if path.is_dir():
                raise CannotWrite(str(path), "it is a folder; name a file")
            if path.exists() and not overwrite:
                raise CannotWrite(str(path), "it exists already; name a new file or overwrite it")
            waiting.append((_temporary(path, content), path))
        for temporary, path in waiting:
            os.replace(temporary, path)  # noqa: PTH105 - the temporary name is a str by design
    except OSError as problem:
        raise CannotWrite(str(path), problem.strerror or str(problem)) from None
    finally:
        for temporary, _ in waiting:
            with suppress(OSError):
                os.unlink(temporary)  # noqa: PTH108


def _temporary(path: Path, content: bytes) -> str:
    handle, name = tempfile.mkstemp(prefix=f".{path.name}.", dir=path.parent)
    try:
        with os.fdopen(handle, "wb") as file:
            file.write(content)
            file.flush()
            os.fsync(file.fileno())
        os.chmod(name, 0o666 & ~_umask())  # noqa: PTH101 - mkstemp makes it private
    except OSError:
        with suppress(OSError):
            os.unlink(name)  # noqa: PTH108
        raise
    return name


def _umask() -> int:
    mask = os.umask(0)
    os.umask(mask)
    return mask
