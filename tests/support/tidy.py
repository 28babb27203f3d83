"""Runs clang-tidy (.clang-tidy) over every source of src and ui that changed since it last passed.

usage: tidy.py BUILD_FOLDER

A source has passed when a stamp in BUILD_FOLDER/tidy carries the hash of .clang-tidy, its command and everything of the
project that it includes (as ninja recorded it), so a second run only looks at what changed.
"""

import concurrent.futures
import hashlib
import json
import os
import subprocess
import sys
from pathlib import Path


def recorded_headers(build):
    """Object file to the files that its last compilation read."""
    headers, current = {}, None
    listed = subprocess.run(["ninja", "-C", str(build), "-t", "deps"], capture_output=True, text=True, check=True).stdout
    for line in listed.splitlines():
        if line and not line.startswith(" "):
            current = headers.setdefault(line.split(":")[0], [])
        elif line:
            current.append((build / line.strip()).resolve())
    return headers


def fingerprint(source, command, object_file, headers, root):
    digest = hashlib.sha256((root / ".clang-tidy").read_bytes() + command.encode())
    ours = {source} | {path for path in headers.get(object_file, []) if root in path.parents and path.exists()}
    for path in sorted(ours):
        digest.update(str(path.relative_to(root)).encode() + path.read_bytes())
    return digest.hexdigest()


def tidy(build, source):
    return subprocess.run(["clang-tidy", "-p", str(build), "--quiet", "--extra-arg=-w", str(source)], text=True,
                          stdout=subprocess.PIPE, stderr=subprocess.STDOUT, stdin=subprocess.DEVNULL)


def changed_sources(build, root, stamps):
    """(source, its stamp, the hash it would carry) of each source of src and ui without a fitting stamp; and how many fit."""
    headers, changed, fitting = recorded_headers(build), [], 0
    for entry in json.loads((build / "compile_commands.json").read_text()):
        source = Path(entry["file"]).resolve()
        if not any(root / folder in source.parents for folder in ("src", "ui")):
            continue
        stamp = stamps / (str(source.relative_to(root)).replace("/", "_") + ".stamp")
        command = entry["command"]
        object_file = command.split(" -o ")[-1].split()[0]
        wanted = fingerprint(source, command, object_file, headers, root)
        if stamp.exists() and stamp.read_text() == wanted:
            fitting += 1
        else:
            changed.append((source, stamp, wanted))
    return changed, fitting


def main():
    root = Path(__file__).resolve().parents[2]
    build = Path(sys.argv[1]).resolve()
    stamps = build / "tidy"
    stamps.mkdir(exist_ok=True)
    changed, fitting = changed_sources(build, root, stamps)
    failed = 0
    with concurrent.futures.ThreadPoolExecutor(os.cpu_count()) as pool:
        for (source, stamp, wanted), done in zip(changed, pool.map(lambda row: tidy(build, row[0]), changed)):
            if done.returncode == 0:
                stamp.write_text(wanted)
            else:
                failed += 1
                print(f"{source.relative_to(root)}:\n{done.stdout}", file=sys.stderr)
    print(f"clang-tidy: {len(changed)} sources checked, {fitting} unchanged, {failed} with findings")
    sys.exit(1 if failed else 0)


if __name__ == "__main__":
    main()
