"""Case files on disk: read, written as a whole, and told apart by a fingerprint."""

from __future__ import annotations

import errno
import os
import secrets
from contextlib import suppress
from pathlib import Path

from headfall.case.faults import CaseError, Fault
from headfall.case.file_text import data_from_bytes, data_from_text
from headfall.case.model import Case
from headfall.case.reading import build_case, read_parts
from headfall.case.writing import canonical_text, case_as_data, case_text

__all__ = ["FileError", "case_from_text", "case_text", "fingerprint", "read_case", "replace_file", "write_case"]

_LARGEST = 50_000_000
_FINGERPRINT_DIGITS = 12
_FINGERPRINT_GROUP = 4

_REASONS = {
    errno.ENOENT: "there is no such folder",
    errno.ENOTDIR: "there is no such folder",
    errno.EISDIR: "that is a folder",
    errno.EACCES: "this account may not write there",
    errno.EPERM: "this account may not write there",
    errno.EROFS: "the disk is write-protected",
    errno.ENOSPC: "the disk is full",
    errno.EDQUOT: "the disk is full",
    errno.ENAMETOOLONG: "the name is too long",
}


class FileError(OSError):
    """A file that could not be written; ``sentence`` says which and why."""

    def __init__(self, path: Path, problem: OSError) -> None:
        reason = _REASONS.get(problem.errno or 0) or (problem.strerror or "the disk refused it").lower()
        self.path = path
        self.sentence = f"{path} was not written: {reason}."
        super().__init__(self.sentence)


def read_case(path: str | os.PathLike[str]) -> Case:
    """Return the case in a file.

    Raises CaseError with every fault found: in the file, in its parts and between them.
    """
    file = Path(path)
    try:
        if file.is_file() and file.stat().st_size > _LARGEST:
            raise CaseError([Fault((), f"{file} is too large to be a case", "Open another file")])
        content = file.read_bytes()
    except FileNotFoundError:
        raise CaseError([Fault((), f"There is no file {file}", "Open another file")]) from None
    except IsADirectoryError:
        raise CaseError([Fault((), f"{file} is a folder", "Open a case file in it")]) from None
    except (OSError, ValueError) as problem:
        if isinstance(problem, CaseError):
            raise
        reason = (getattr(problem, "strerror", None) or "its name cannot be used").lower()
        raise CaseError([Fault((), f"{file} cannot be read: {reason}", "Open another file")]) from None
    return _sound_case(data_from_bytes(content))


def case_from_text(text: str) -> Case:
    """Return the case in the text of a case file. Raises CaseError as ``read_case`` does."""
    return _sound_case(data_from_text(text))


def write_case(case: Case, path: str | os.PathLike[str]) -> None:
    """Write a case to a file, as it was typed; the file is replaced as a whole or stays as it was.

    Raises CaseError for a case that could not be read back and FileError where the file cannot be written.
    """
    _sound_case(case_as_data(case))
    replace_file(path, case_text(case).encode("utf-8"))


def replace_file(path: str | os.PathLike[str], content: bytes) -> None:
    """Put content in the place of a file as a whole: whatever happens, the old file or the new one is there.

    Raises FileError where that cannot be done.
    """
    file = Path(path)
    try:
        # A link stays a link: what it points to is replaced.
        target = Path(os.path.realpath(file))
        if target.is_dir():
            raise IsADirectoryError(errno.EISDIR, "Is a directory")
        _replace(target, content)
    except OSError as problem:
        raise FileError(file, problem) from problem
    except ValueError as problem:
        raise FileError(file, OSError(errno.EINVAL, "its name cannot be used")) from problem


def fingerprint(case: Case) -> str:
    """Return twelve hexadecimal digits that tell cases apart, as in ``7c1e 40b2 9ad3``.

    They are the first of the SHA-256 of what was typed, without spaces and with the keys in alphabetical order.
    """
    import hashlib

    digits = hashlib.sha256(canonical_text(case).encode("utf-8")).hexdigest()[:_FINGERPRINT_DIGITS]
    return " ".join(digits[at : at + _FINGERPRINT_GROUP] for at in range(0, len(digits), _FINGERPRINT_GROUP))


def _sound_case(data: object) -> Case:
    """Return the case. Raises CaseError with the faults in its parts and between them, one a place."""
    # Imported here, for the layers below do not need the vessels to read a file's text.
    from headfall.system import find_faults

    parts, faults = read_parts(data)
    places = {fault.path for fault in faults}
    faults += [fault for fault in find_faults(parts) if fault.path not in places]
    if faults:
        raise CaseError(faults)
    return build_case(parts)


def _replace(target: Path, content: bytes) -> None:
    trial = target.with_name(f".headfall-{secrets.token_hex(6)}.part")
    try:
        with open(trial, "xb") as stream:
            stream.write(content)
            stream.flush()
            os.fsync(stream.fileno())
        with suppress(OSError):
            os.chmod(trial, target.stat().st_mode & 0o7777)
        os.replace(trial, target)
    except BaseException:
        with suppress(OSError):
            trial.unlink()
        raise
    _sync_folder(target.parent)


def _sync_folder(folder: Path) -> None:
    # The new name is on disk only once its folder is; some systems cannot open a folder, and then leave it at that.
    with suppress(OSError):
        handle = os.open(folder, os.O_RDONLY)
        try:
            os.fsync(handle)
        finally:
            os.close(handle)
