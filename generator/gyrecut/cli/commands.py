"""The commands: each answers one question, and gives its answer back instead of printing it.

What is heavy is imported inside the commands that need it: `gyrecut --help` would pay for it.
"""

import json
from functools import partial
from pathlib import Path
from shlex import quote
from typing import Annotated

import typer

from gyrecut import __version__
from gyrecut.cli.replies import Reply
from gyrecut.cli.streams import tell, write_line
from gyrecut.errors import FINE, USAGE

app = typer.Typer(
    name="gyrecut",
    help="Make a printable cyclone dust separator from one YAML profile.",
    epilog="Exit codes: 0 fine, 1 a finding says stop, 2 wrong usage, 3 profile invalid, 4 build "
    "or export failed, 70 our own fault, 130 stopped by Ctrl-C, 141 nobody reads the result.",
    add_completion=False,
    pretty_exceptions_enable=False,
    rich_markup_mode=None,
    context_settings={"help_option_names": ["-h", "--help"]},
)

SCHEMA_FILE = "profile.schema.json"  # the name a profile's first line asks an editor for

ProfilePath = Annotated[Path, typer.Argument(metavar="PROFILE", help="The profile, a YAML file.")]
AsJson = Annotated[
    bool, typer.Option("--json", help="Give one JSON document instead of text, also on failure.")
]
Quiet = Annotated[bool, typer.Option("--quiet", "-q", help="No progress and no hints on stderr.")]


def _say_version(wanted: bool) -> None:
    if wanted:
        typer.echo(f"gyrecut {__version__}")
        raise typer.Exit


@app.callback(invoke_without_command=True)
def without_command(
    context: typer.Context,
    _version: Annotated[
        bool,
        typer.Option("--version", callback=_say_version, is_eager=True, help="Say the version."),
    ] = False,
) -> None:
    """Help whoever gives no command, on stderr: it is no result."""
    if context.invoked_subcommand is None:
        tell(context.get_help())
        raise typer.Exit(USAGE)


@app.command()
def new(
    path: Annotated[
        Path | None, typer.Argument(metavar="[PATH]", help="File to write; NAME.yaml if left out.")
    ] = None,
    name: Annotated[
        str | None, typer.Option("--name", help="Name of the design; made of the file's name.")
    ] = None,
    as_json: AsJson = False,
    quiet: Quiet = False,
) -> Reply:
    """Write a commented profile to start from."""
    from gyrecut.cli.starter import name_from, write_starter

    called = name_from(path) if name is None else name
    target = Path(f"{called}.yaml") if path is None else path
    write_starter(called, target)
    described = quote(str(target.parent / SCHEMA_FILE))
    tell(
        f"Put your own workshop into it, then: gyrecut size {quote(str(target))}\n"
        f"For an editor that completes it: gyrecut schema > {described}",
        quiet=quiet,
    )
    return Reply(
        command="new",
        result={"path": str(target), "name": called},
        show=partial(write_line, str(target)),
        as_json=as_json,
    )


@app.command()
def size(
    profile: ProfilePath,
    explain: Annotated[
        bool,
        typer.Option(
            "--explain",
            help="Add to each number its formula, the numbers put in, and the source.",
        ),
    ] = False,
    as_json: AsJson = False,
    quiet: Quiet = False,
) -> Reply:
    """Say its size, its catch and its cost; nothing is built."""
    from gyrecut.cli.designing import designed
    from gyrecut.cli.findings import exit_code_of
    from gyrecut.cli.size_report import show_design, size_document
    from gyrecut.profile import load_profile

    design = designed(profile, load_profile(profile))
    code = exit_code_of(design.findings)
    result, show = size_document(design), partial(show_design, design)
    if explain:
        from gyrecut.cli.explain import explained, explanations, with_explanations

        lines = explanations(design)
        result, show = explained(result, lines), partial(with_explanations, show, lines)
    if code == FINE:
        tell(f"When it suits you: gyrecut build {quote(str(profile))}", quiet=quiet)
    return Reply(
        command="size",
        result=result,
        show=show,
        as_json=as_json,
        exit_code=code,
    )


@app.command()
def build(
    profile: ProfilePath,
    out: Annotated[
        Path | None,
        typer.Option("--out", metavar="DIR", help="Folder for the kit; out/NAME if left out."),
    ] = None,
    as_json: AsJson = False,
    quiet: Quiet = False,
) -> Reply:
    """Make the kit: STEP, STL and 3MF files, manifest and summary."""
    from gyrecut import pipeline
    from gyrecut.cli.build_report import kit_document, show_kit
    from gyrecut.cli.designing import designed
    from gyrecut.cli.findings import exit_code_of
    from gyrecut.cli.progress import progress
    from gyrecut.cli.system import require_cad
    from gyrecut.kit.folder import check_target
    from gyrecut.profile import load_profile

    read = load_profile(profile)
    folder = out or Path("out", read.name)
    check_target(folder)
    design = designed(profile, read)
    require_cad()
    with progress(quiet=quiet) as further:
        result = pipeline.build(design, folder, further)
    return Reply(
        command="build",
        result=kit_document(design, result),
        show=partial(show_kit, design, result),
        as_json=as_json,
        exit_code=exit_code_of(result.findings),
    )


@app.command("list")
def list_(
    table: Annotated[
        str,
        typer.Argument(
            metavar="TABLE",
            help="families, dusts, polymers, hoses, sources, filters, fasteners or measured.",
        ),
    ],
    as_json: AsJson = False,
    quiet: Quiet = False,  # noqa: ARG001 - taken by every command, and here there is nothing to hush
) -> Reply:
    """Show a shipped table, with the sources of its numbers."""
    from gyrecut.cli.listing import VIEWS, rows_of, show_rows

    if table not in VIEWS:
        unknown = f'"{table}" is no table; allowed: {", ".join(VIEWS)}'
        raise typer.BadParameter(unknown, param_hint="TABLE")
    return Reply(
        command="list",
        result={"table": table, "rows": rows_of(table)},
        show=partial(show_rows, table),
        as_json=as_json,
    )


@app.command()
def schema(as_json: AsJson = False, quiet: Quiet = False) -> Reply:  # noqa: ARG001 - as above
    """Give the JSON Schema of a profile, for an editor."""
    from gyrecut.profile.schema import profile_schema

    described = profile_schema()
    text = json.dumps(described, indent=2)
    return Reply(
        command="schema",
        result={"schema": described},
        show=partial(write_line, text),
        as_json=as_json,
    )
