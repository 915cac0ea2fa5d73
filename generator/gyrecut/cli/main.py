"""The way in and the way out: run a command, say what came of it, leave with its code."""

from __future__ import annotations

import os
import sys
import traceback
from typing import TYPE_CHECKING

import typer
from typer.main import get_command

from gyrecut.cli.commands import app
from gyrecut.cli.replies import Failure, failure_of
from gyrecut.cli.streams import accept_any_text, give_up, tell
from gyrecut.errors import OUR_FAULT, USAGE, BuildError, GyrecutError

if TYPE_CHECKING:
    from collections.abc import Sequence

    from gyrecut.cli.replies import Reply

INTERRUPTED = 130  # 128 + SIGINT, as a shell counts it
READER_LEFT = 141  # 128 + SIGPIPE, same


def main() -> None:
    """Run the command line and leave with one of the exit codes README.md lists."""
    arguments = sys.argv[1:]
    try:
        accept_any_text()
        code = _answer(arguments)
    except BrokenPipeError:
        give_up(sys.stdout)
        code = READER_LEFT
    except KeyboardInterrupt:
        stopped = Failure(exit_code=INTERRUPTED, kind="interrupted", message="stopped by Ctrl-C")
        code = _fail(arguments, stopped)
    except typer.TyperException as wrong:
        code = _fail(arguments, _wrong_usage(wrong))
    except GyrecutError as wrong:
        code = _fail(arguments, failure_of(wrong))
    except Exception as fault:  # noqa: BLE001 - the one place where a fault of ours may surface
        code = _fail(arguments, _our_fault(fault))
    sys.exit(code)


def _answer(arguments: Sequence[str]) -> int:
    command = get_command(app)
    try:
        with command.make_context("gyrecut", list(arguments)) as context:
            reply: Reply = command.invoke(context)
    except typer.Exit as left:  # --help or --version, said already
        return left.exit_code
    try:
        reply.write(sys.stdout)
        sys.stdout.flush()
    except BrokenPipeError:
        raise
    except OSError as wrong:
        give_up(sys.stdout)
        raise BuildError(f"the result could not be written: {wrong.strerror}") from wrong
    return reply.exit_code


def _fail(arguments: Sequence[str], failure: Failure) -> int:
    tell(f"gyrecut: {failure.message}")
    if "--json" in arguments:
        command = next((word for word in arguments if not word.startswith("-")), None)
        try:
            sys.stdout.write(failure.document(command))
            sys.stdout.flush()
        except OSError:  # nobody reads on; the exit code says it all the same
            give_up(sys.stdout)
    return failure.exit_code


def _wrong_usage(wrong: typer.TyperException) -> Failure:
    path = getattr(getattr(wrong, "ctx", None), "command_path", "gyrecut")
    message = f"{wrong.format_message()}\n  see: {path} --help"
    return Failure(exit_code=USAGE, kind="usage", message=message)


def _our_fault(fault: Exception) -> Failure:
    if os.environ.get("GYRECUT_DEBUG") == "1":
        tell("".join(traceback.format_exception(fault)))
    what = " ".join(f"{type(fault).__name__}: {fault}".split())
    message = (
        f"this is a fault of gyrecut, not of yours ({what}); to report it, send the profile, "
        "what `gyrecut --version` says, and what this command says with GYRECUT_DEBUG=1 set"
    )
    return Failure(exit_code=OUR_FAULT, kind="fault", message=message)
