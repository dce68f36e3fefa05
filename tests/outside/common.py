"""What the outside tests share: verdicts, fetched packages, the program."""
import json
import os
import pathlib
import shutil
import subprocess
import sys
import tempfile


class Verdicts:
    """Prints statements in the Test Anything Protocol."""

    def __init__(self):
        self.count = 0

    def holds(self, statement, fact, *details):
        self.count += 1
        print(f"{'' if fact else 'not '}ok {self.count} - {statement}")
        if not fact:
            for detail in details:
                print("#   " + str(detail).replace("\n", "\n#   "))

    def skipped(self, statement, reason):
        self.count += 1
        print(f"ok {self.count} - {statement} # SKIP {reason}")

    def finish(self):
        print(f"1..{self.count}", flush=True)


def _download(name, folder):
    """The Debian package `name` as a file in folder, or None."""
    patience = ["-o", "Acquire::Retries=1", "-o", "Acquire::http::Timeout=20"]
    download = ["apt-get", "-qq", *patience, "download", name]
    for command in (download, ["apt-get", "-qq", *patience, "update"],
                    download):
        subprocess.run(command, cwd=folder, stdin=subprocess.DEVNULL,
                       stdout=sys.stderr, check=False)
        found = list(pathlib.Path(folder).glob("*.deb"))
        if found:
            return found[0]
    return None


def fetch(name, *files):
    """A folder that holds `files` of the Debian package `name`; None when it
    can't be had. Kept in LEE_CACHE, or here, from one run to the next."""
    cache = pathlib.Path(os.environ.get("LEE_CACHE", "outside-data"))
    kept = cache / name
    if all((kept / file).is_file() for file in files):
        return kept
    if shutil.which("apt-get") is None or shutil.which("dpkg-deb") is None:
        return None
    cache.mkdir(parents=True, exist_ok=True)
    with tempfile.TemporaryDirectory(dir=cache) as work:
        package = _download(name, work)
        if package is None:
            return None
        inside = pathlib.Path(work) / "inside"
        subprocess.run(["dpkg-deb", "-x", package, inside], check=True)
        for file in files:
            (kept / file).parent.mkdir(parents=True, exist_ok=True)
            # A rename: whole or not at all when two suites fetch at once.
            os.replace(inside / file, kept / file)
    return kept


def without_data(name):
    """Ends a test whose data can't be had: in continuous integration that is
    a failure, elsewhere a skip that says so."""
    verdicts = Verdicts()
    statement = f"the open data of the Debian package {name} can be fetched"
    if os.environ.get("CI") == "true":
        verdicts.holds(statement, False, "no network, or no such package")
    else:
        verdicts.skipped(statement, "no network, or no such package")
    verdicts.finish()


def run(program, *arguments):
    """Runs the program. Its result has status, out and err."""
    return subprocess.run([program, *map(str, arguments)], text=True,
                          stdin=subprocess.DEVNULL, capture_output=True,
                          check=False)


def summary(program, *arguments):
    """The JSON summary of a run that has to succeed."""
    done = run(program, *arguments, "--json")
    if done.returncode != 0:
        raise SystemExit(f"{' '.join(map(str, arguments))}: {done.stderr}")
    return json.loads(done.stdout)
