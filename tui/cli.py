"""The `stillroom` command: reads arguments, calls a sub-command, makes errors one line."""

from __future__ import annotations

import argparse
import os
import sys
from collections.abc import Sequence
from pathlib import Path
from typing import NoReturn

from stillroom.chem.data.errors import StillroomError
from stillroom.tui.commands.common import STORE_HELP, join_negative_values
from stillroom.tui.exits import BAD_INPUT, OK

_COMMANDS = ("list", "show", "pair", "rank", "shortlist", "sources")


class _Parser(argparse.ArgumentParser):
    """An argument parser that complains in one line."""

    def error(self, message: str) -> NoReturn:
        """Write the complaint and leave with the status of bad input."""
        sys.stderr.write(f"{self.prog}: {message} (see {self.prog} --help)\n")
        sys.exit(BAD_INPUT)


def build_parser() -> argparse.ArgumentParser:
    """Return the parser with all sub-commands."""
    from importlib import import_module

    parser = _Parser(
        prog="stillroom",
        description="A workbench for choosing, replacing and pairing solvents and polar liquids. "
        "Without a command it opens the workbench.",
        allow_abbrev=False,
    )
    parser.add_argument("--version", action="store_true", help="print the version and leave")
    parser.add_argument("--store", type=Path, metavar="PATH", help=STORE_HELP)
    parser.add_argument("--temperature", metavar="T", help='such as "40 degC" or "313 K"')
    commands = parser.add_subparsers(dest="command", metavar="COMMAND", parser_class=_Parser)
    for name in _COMMANDS:
        import_module(f"stillroom.tui.commands.{name}").register(commands)
    return parser


def main(arguments: Sequence[str] | None = None) -> int:
    """Run `stillroom` and return its exit status."""
    parser = build_parser()
    words = list(sys.argv[1:] if arguments is None else arguments)
    args = parser.parse_args(join_negative_values(words))
    try:
        if args.version:
            from importlib.metadata import version

            print("stillroom", version("stillroom"))
            return OK
        if args.command is None:
            return _open_workbench(args)
        status: int = args.run(args)
        sys.stdout.flush()
        return status
    except StillroomError as problem:
        sys.stderr.write(f"stillroom: {problem}\n")
        return BAD_INPUT
    except BrokenPipeError:  # the reader of a pipe went away, as with `| head`
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
        return OK
    except OSError as problem:  # standard output is full or closed
        sys.stderr.write(f"stillroom: cannot write the output ({problem.strerror})\n")
        return BAD_INPUT
    except KeyboardInterrupt:
        return 130


def _open_workbench(args: argparse.Namespace) -> int:
    from stillroom.tui.terminal import check_terminal

    problem = check_terminal()
    if problem is not None:
        sys.stderr.write(f"stillroom: {problem}\n")
        return BAD_INPUT
    from stillroom.tui.app import open_workbench

    return open_workbench(args.store, args.temperature)


if __name__ == "__main__":
    sys.exit(main())
