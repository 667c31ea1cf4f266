"""Fails when a C++ file of the project differs from what clang-format makes of it.

Usage: format_test.py CLANG_FORMAT. Files: those git tracks, or all where the sources are no git checkout.
"""

import pathlib
import subprocess
import sys

TOP = pathlib.Path(__file__).resolve().parents[2]
FOLDERS = ["mesh", "solver", "validation", "io", "examples", "tests"]


def sources():
    try:
        command = ["git", "-c", f"safe.directory={TOP}", "-C", str(TOP), "ls-files", "-z", "--", *FOLDERS]
        listed = subprocess.run(command, check=True, capture_output=True, text=True).stdout.split("\0")
        files = [TOP / name for name in listed if name]
    except (OSError, subprocess.CalledProcessError):
        files = [path for folder in FOLDERS for path in (TOP / folder).rglob("*")]
    return [str(p) for p in files if p.suffix in (".cpp", ".hpp") and p.is_file()]


def main(clang_format):
    files = sources()
    if not files:
        sys.exit("no C++ file found: the check cannot have looked at the project")
    bad = subprocess.run([clang_format, "--style=file", "--dry-run", "-Werror", *files]).returncode
    if bad:
        sys.exit(f"some of the {len(files)} files are not formatted; run {clang_format} -i on those named above")
    print(f"{len(files)} files are formatted")


if __name__ == "__main__":
    main(*sys.argv[1:])
