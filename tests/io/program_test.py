"""The program as a user meets it: exit codes, files, pipes, signals, and its
JSON against its schema. Run by ctest: program_test.py PROGRAM SOURCE_DIR."""

import copy
import csv
import hashlib
import json
import os
import pathlib
import pty
import resource
import signal
import subprocess
import sys
import tempfile
import time
import unittest

import jsonschema

PROGRAM = pathlib.Path(sys.argv[1]).resolve()
SOURCE = pathlib.Path(sys.argv[2]).resolve()
SUFFIXES = [".vtu", ".json", ".png", ".svg", "-edge.csv", "-ligament.csv"]

# Invented data.
GOOD = """raiser = 1
title = "Test strap (invented data)"
[plate]
length = "120 mm"
width = "40 mm"
thickness = "3 mm"
[material]
youngs_modulus = "70 GPa"
poissons_ratio = 0.33
[[hole]]
name = "pin"
shape = "circle"
diameter = "10 mm"
[[load]]
kind = "tension"
stress = "50 MPa"
"""
BROKEN = GOOD.replace('"120 mm"', '"120"').replace('"70 GPa"', '"70 MPa s"')
OUTSIDE = GOOD.replace('diameter = "10 mm"', 'diameter = "60 mm"')
UNBALANCED = GOOD.replace('kind = "tension"\nstress', 'kind = "edge"\nedge = "right"\nnormal')
TOO_FINE = GOOD + '[ask]\ntolerance = "0.0000002 %"\n'


# Invented data.
CRACKED = GOOD.split("[[hole]]")[0] + """[[crack]]
name = "flaw"
edge = "top"
length = "6 mm"
[[load]]
kind = "tension"
stress = "50 MPa"
"""


def many_holes(columns, rows, tolerance):
    text = GOOD.split("[[hole]]")[0]
    text = text.replace('"120 mm"', f'"{30 * columns} mm"').replace('"40 mm"', f'"{30 * rows} mm"')
    for i in range(columns):
        for j in range(rows):
            x, y = 30 * (i + 0.5 - columns / 2) + (i * 7 + j * 3) % 5, 30 * (j + 0.5 - rows / 2)
            text += f'[[hole]]\nshape = "circle"\ndiameter = "10 mm"\nat = ["{x} mm", "{y} mm"]\n'
    return text + '[[load]]\nkind = "tension"\nstress = "50 MPa"\n' + f'[ask]\ntolerance = "{tolerance}"\n'


class Program(unittest.TestCase):
    def setUp(self):
        self.keeper = tempfile.TemporaryDirectory()
        self.folder = pathlib.Path(self.keeper.name)

    def tearDown(self):
        self.keeper.cleanup()

    def case(self, name, text):
        path = self.folder / name
        path.parent.mkdir(parents=True, exist_ok=True)
        path.write_text(text)
        return name

    def run_it(self, *arguments, **options):
        return subprocess.run([PROGRAM, *arguments], cwd=self.folder, capture_output=True, text=True, timeout=120,
                              **options)

    def names(self, folder="."):
        return sorted(p.name for p in (self.folder / folder).iterdir())

    def expect(self, code, result):
        self.assertEqual(result.returncode, code, result.stdout + result.stderr)


class ExitCodes(Program):
    def test_settled(self):
        result = self.run_it("solve", self.case("strap.toml", GOOD))
        self.expect(0, result)
        self.assertIn("Kt gross", result.stdout)
        self.assertEqual(self.names(), sorted(["strap.toml"] + ["strap" + s for s in SUFFIXES]))

    def test_usage(self):
        for arguments in [[], ["solve"], ["check"], ["solve", "--colour", "a"], ["dance"], ["solve", "a", "--out"],
                          ["check", "a", "--json"]]:
            result = self.run_it(*arguments)
            self.expect(2, result)
            self.assertEqual(result.stdout, "")
            self.assertIn("raiser", result.stderr)

    def test_input(self):
        result = self.run_it("solve", self.case("bad.toml", BROKEN))
        self.expect(3, result)
        self.assertIn("bad.toml:4:", result.stderr)
        self.assertIn("bad.toml:8:", result.stderr, "both faults in one go")
        self.assertEqual(self.names(), ["bad.toml"])
        self.expect(3, self.run_it("solve", "missing.toml"))
        self.expect(3, self.run_it("check", "missing.toml"))
        self.expect(3, self.run_it("solve", ""))
        (self.folder / "ring.toml").symlink_to("ring.toml")
        os.mkfifo(self.folder / "pipe.toml")
        for name, reason in [("ring.toml", "symbolic links"), ("pipe.toml", "not a regular file"),
                             ("x" * 300 + ".toml", "too long")]:
            result = self.run_it("solve", name)
            self.expect(3, result)
            self.assertIn(reason, result.stderr)

    def test_illegal(self):
        for text in [OUTSIDE, UNBALANCED]:
            name = self.case("illegal.toml", text)
            for command in ["solve", "check"]:
                self.expect(4, self.run_it(command, name))
            self.assertEqual(self.names(), ["illegal.toml"])

    def test_many_conflicts_are_counted_not_listed(self):
        head, hole, tail = GOOD.partition('[[hole]]\nname = "pin"\nshape = "circle"\ndiameter = "10 mm"\n')
        self.assertTrue(hole)
        pile = head + hole.replace('name = "pin"\n', "") * 50 + tail
        result = self.run_it("check", self.case("pile.toml", pile))
        self.expect(4, result)
        lines = result.stderr.splitlines()
        # Hole i conflicts with 50 - i later ones: three in full, then a count.
        self.assertEqual(len(lines), 46 * 4 + 3 + 2 + 1)
        self.assertIn("pile.toml:10:1: hole 'hole 1' lies in the way of 46 later holes more", lines[3])

    def test_not_met(self):
        result = self.run_it("solve", self.case("fine.toml", TOO_FINE), "--json")
        document = json.loads(result.stdout)["cases"][0]
        if document["exit_code"] == 0:  # then every bound really is that small
            for asked in document["result"]["asked"]:
                self.assertLessEqual(asked["result"]["bound"], asked["largest_bound_allowed"]["value"])
        else:
            self.expect(5, result)
            self.assertEqual(document["status"], "not met")
            self.assertTrue(document["result"]["reason"])

    def test_help_and_version(self):
        for arguments in [["--help"], ["solve", "--help"], ["check", "-h"]]:
            result = self.run_it(*arguments)
            self.expect(0, result)
            self.assertEqual(result.stderr, "")
            self.assertIn("exit codes", result.stdout)
            self.assertIn("example", result.stdout)
            self.assertLessEqual(max(map(len, result.stdout.splitlines())), 80)
        result = self.run_it("--version")
        self.expect(0, result)
        self.assertRegex(result.stdout, r"^raiser \d+\.\d+\.\d+\n$")

    def test_validate_holds_published_values_against_ours(self):
        result = self.run_it("validate", "slot-infinite", "circle-infinite", "--quick", "--out", "charts")
        self.expect(0, result)
        self.assertIn("slot-infinite (A15)", result.stdout)
        self.assertTrue(all(len(line) <= 80 for line in result.stdout.splitlines()))
        names = {"validation.md", "validation.json", "slot-infinite.svg", "circle-infinite.svg"}
        self.assertEqual(names, set(os.listdir(self.folder / "charts")))
        document = json.loads(self.run_it("validate", "circle-infinite", "--json").stdout)
        self.assertEqual([f["id"] for f in document["families"]], ["circle-infinite"])
        self.assertEqual(len(document["families"][0]["points"]), 5)
        self.assertIn("slot-infinite", self.run_it("validate", "--list").stdout)

    def test_draws_charts_when_asked(self):
        case = self.case("strap.toml", GOOD)
        self.assertEqual(self.run_it("solve", "--charts", case).returncode, 0)
        for name in ("edge-1", "ligament-1", "ligament-2"):
            text = (self.folder / f"strap-{name}.svg").read_text()
            self.assertIn("<svg", text)
        self.assertEqual(self.run_it("solve", "--charts", "--no-files", case).returncode, 2)

    @unittest.skipIf("sanitize" in str(PROGRAM), "sanitizers need more address space than that")
    def test_ends_with_an_error_where_memory_is_short(self):
        case = self.case("strap.toml", GOOD)
        result = subprocess.run(["sh", "-c", 'ulimit -v 262144; exec "$0" solve "$1"', PROGRAM, case],
                                cwd=self.folder, capture_output=True, text=True, timeout=60)
        self.assertEqual(result.returncode, 5, result.stderr)
        self.assertIn("not enough memory", result.stderr)

    def test_validate_names_every_unknown_family(self):
        result = self.run_it("validate", "slot-infinit", "nonsense", "--quick")
        self.expect(2, result)
        self.assertIn("did you mean slot-infinite?", result.stderr)
        self.assertIn('"nonsense"', result.stderr)
        self.assertEqual(result.stdout, "")

    def test_check_writes_nothing(self):
        result = self.run_it("check", self.case("strap.toml", GOOD))
        self.expect(0, result)
        self.assertIn("plane stress", result.stdout)
        self.assertEqual(self.names(), ["strap.toml"])
        self.assertEqual(self.run_it("check", "strap.toml", "--quiet").stdout, "")


class ManyCases(Program):
    def test_a_faulty_one_stops_no_other(self):
        self.case("a.toml", GOOD)
        self.case("b.toml", BROKEN)
        self.case("c.toml", GOOD.replace('"10 mm"', '"16 mm"'))
        result = self.run_it("solve", "a.toml", "b.toml", "nowhere.toml", "c.toml", "--out", "made/here")
        self.expect(7, result)
        self.assertIn("4 cases: 2 settled, 2 not read", result.stdout)
        self.assertLessEqual(max(map(len, result.stdout.splitlines())), 80)
        expected = ["summary.csv"] + [stem + s for stem in "ac" for s in SUFFIXES]
        self.assertEqual(self.names("made/here"), sorted(expected))
        self.assertEqual(self.names(), ["a.toml", "b.toml", "c.toml", "made"])
        with open(self.folder / "made/here/summary.csv", newline="") as file:
            rows = list(csv.DictReader(file))
        self.assertEqual([row["exit_code"] for row in rows], ["0", "3", "3", "0"])
        self.assertLess(float(rows[0]["kt_gross"]), float(rows[3]["kt_gross"]), "a wider hole in the same strip")
        self.assertEqual(rows[1]["kt_gross"], "")

    def test_plates_with_cracks_stand_beside_plates_with_holes(self):
        self.case("hole.toml", GOOD)
        self.case("crack.toml", CRACKED)
        self.case("leaves.toml", CRACKED.replace('"6 mm"', '"41 mm"'))
        result = self.run_it("solve", "hole.toml", "crack.toml", "leaves.toml", "--out", "x")
        self.expect(7, result)
        self.assertIn("worst tip", result.stdout)
        self.assertIn("crack 'flaw' meets the bottom edge", result.stderr)
        self.assertLessEqual(max(map(len, result.stdout.splitlines())), 80)
        expected = ["hole" + s for s in SUFFIXES] + ["crack" + s for s in SUFFIXES + ["-tips.csv"]] + ["summary.csv"]
        self.assertEqual(self.names("x"), sorted(expected))
        with open(self.folder / "x/summary.csv", newline="") as file:
            rows = list(csv.DictReader(file))
        self.assertEqual([row["tip"] for row in rows], ["", "flaw", ""])
        with open(self.folder / "x/crack-tips.csv", newline="") as file:
            tips = list(csv.DictReader(file))
        self.assertEqual([row["load"] for row in tips], ["all loads", "tension"])
        self.assertEqual(tips[0]["K_I_MPa_sqrt_mm"], rows[1]["K_I_MPa_sqrt_mm"])
        # 1.2648 for a/W = 0.15 within 0.5 %: W. F. Brown and J. E. Srawley, ASTM STP 410 (1966)
        self.assertAlmostEqual(float(tips[0]["Y_I"]), 1.2648, delta=0.0063)

    def test_all_settled(self):
        self.case("one/a.toml", GOOD)
        self.case("two/a.toml", GOOD)
        self.expect(0, self.run_it("solve", "one/a.toml", "two/a.toml"))
        self.assertIn("a.vtu", self.names("two"))
        self.assertIn("summary.csv", self.names("one"))

    def test_clashing_names(self):
        self.case("one/a.toml", GOOD)
        self.case("two/a.toml", GOOD)
        for arguments in [["one/a.toml", "two/a.toml", "--out", "x"], ["one/a.toml", "one/../one/a.toml"]]:
            result = self.run_it("solve", *arguments)
            self.expect(2, result)
            self.assertIn("would both write", result.stderr)
        self.assertEqual(self.names(), ["one", "two"])
        self.expect(0, self.run_it("solve", "one/a.toml", "one/a.toml", "--no-files"))

    def test_a_result_never_replaces_a_case(self):
        self.case("a.toml", GOOD)
        self.case("a.json", GOOD)
        result = self.run_it("solve", "a.json")
        self.expect(2, result)
        self.assertIn("overwrite", result.stderr)
        self.assertEqual((self.folder / "a.json").read_text(), GOOD)
        self.case("summary.csv", GOOD)
        result = self.run_it("solve", "a.toml", "summary.csv")
        self.expect(2, result)
        self.assertIn("the summary would overwrite the case file summary.csv", result.stderr)
        self.assertEqual((self.folder / "summary.csv").read_text(), GOOD)
        self.expect(0, self.run_it("solve", "a.toml", "summary.csv", "--out", "x"))


class Streams(Program):
    def test_quiet(self):
        result = self.run_it("solve", self.case("strap.toml", GOOD), "--quiet")
        self.expect(0, result)
        self.assertEqual(result.stdout + result.stderr, "")
        self.assertIn("strap.json", self.names())

    def test_full_output(self):
        self.case("strap.toml", GOOD)
        for command in [["solve", "strap.toml"], ["check", "strap.toml"], ["--help"]]:
            with open("/dev/full", "w") as full:
                result = subprocess.run([PROGRAM, *command], cwd=self.folder, stdout=full, stderr=subprocess.PIPE,
                                        text=True, timeout=60)
            self.assertEqual(result.returncode, 8, result.stderr)
            self.assertIn("cannot write to standard output", result.stderr)

    def test_broken_pipe(self):
        self.case("strap.toml", GOOD)
        reading, writing = os.pipe()
        os.close(reading)
        result = subprocess.run([PROGRAM, "solve", "strap.toml"], cwd=self.folder, stdout=writing,
                                stderr=subprocess.PIPE, text=True, timeout=60)
        os.close(writing)
        self.assertEqual(result.returncode, 0, result.stderr)
        self.assertNotIn("cannot", result.stderr)
        self.assertIn("strap.vtu", self.names())

    def on_a_terminal(self, *arguments, **extra):
        """What the program writes to a terminal."""
        environment = {k: v for k, v in os.environ.items() if k != "NO_COLOR"} | {"TERM": "xterm"} | extra
        ours, its = pty.openpty()
        process = subprocess.Popen([PROGRAM, *arguments], cwd=self.folder, stdout=its, stderr=its, env=environment)
        os.close(its)
        text = b""
        while True:
            try:
                part = os.read(ours, 65536)
            except OSError:
                part = b""
            if not part:
                break
            text += part
        os.close(ours)
        self.assertEqual(process.wait(timeout=60), 0)
        return text.decode()

    def test_colours_and_progress_on_a_terminal_only(self):
        self.case("strap.toml", GOOD)
        text = self.on_a_terminal("solve", "strap.toml")
        self.assertIn("\x1b[1;32mSETTLED", text)
        self.assertIn("solving", text)
        text = self.on_a_terminal("solve", "strap.toml", NO_COLOR="1")
        self.assertNotIn("\x1b[1;32m", text)
        result = self.run_it("solve", "strap.toml")
        self.assertNotIn("\x1b", result.stdout + result.stderr)
        self.assertNotIn("solving", result.stderr)


class Failures(Program):
    def test_unwritable_folders(self):
        self.case("strap.toml", GOOD)
        self.case("file", "")
        for folder in ["file", "file/below", "/proc/raiser"]:
            result = self.run_it("solve", "strap.toml", "--out", folder)
            self.expect(8, result)
            self.assertIn("cannot write " + folder, result.stderr)
        self.assertEqual(self.names(), ["file", "strap.toml"])

    def test_full_disk_leaves_nothing_half(self):
        self.case("strap.toml", GOOD)

        def tight():
            resource.setrlimit(resource.RLIMIT_FSIZE, (20000, resource.RLIM_INFINITY))

        # Built for coverage the program keeps counts at its exit: not in files cut short.
        with tempfile.TemporaryDirectory() as counts:
            result = self.run_it("solve", "strap.toml", "--out", "results", preexec_fn=tight,
                                 env={**os.environ, "GCOV_PREFIX": counts})
        self.expect(8, result)
        self.assertEqual(result.stderr.count("cannot write"), 1, result.stderr)
        self.assertIn("strap.vtu", result.stderr)
        self.assertIn("make room", result.stderr)
        self.assertEqual(self.names(), ["strap.toml"])

    def test_full_file_system_keeps_older_results(self):
        disk = self.folder / "disk"
        disk.mkdir()
        mount = subprocess.run(["mount", "-t", "tmpfs", "-o", "size=1m", "none", disk], capture_output=True)
        if mount.returncode != 0:
            self.skipTest("no right to mount a small file system")
        try:
            self.case("strap.toml", GOOD)
            (disk / "strap.json").write_text("older")
            (disk / "ballast").write_bytes(b"x" * 900_000)
            result = self.run_it("solve", "strap.toml", "--out", "disk")
            self.expect(8, result)
            self.assertIn("make room", result.stderr)
            self.assertEqual(self.names("disk"), ["ballast", "strap.json"])
            self.assertEqual((disk / "strap.json").read_text(), "older")
        finally:
            subprocess.run(["umount", disk], check=True)

    def test_interrupt_keeps_what_is_done(self):
        self.case("a.toml", GOOD)
        self.case("slow.toml", many_holes(28, 28, "0.0001 %"))
        process = subprocess.Popen([PROGRAM, "solve", "a.toml", "slow.toml", "--out", "x", "--json"], cwd=self.folder,
                                   stdout=subprocess.PIPE, stderr=subprocess.PIPE, text=True)
        deadline = time.monotonic() + 60
        while not (self.folder / "x/a.json").exists() and time.monotonic() < deadline:
            time.sleep(0.02)
        time.sleep(0.2)
        process.send_signal(signal.SIGINT)
        start = time.monotonic()
        out, err = process.communicate(timeout=60)
        self.assertEqual(process.returncode, 130, err)
        self.assertLess(time.monotonic() - start, 3.0)
        self.assertIn("interrupted; 1 of 2 cases are done and kept", err)
        self.assertEqual(len(json.loads(out)["cases"]), 1)
        self.assertEqual(self.names("x"), sorted(["summary.csv"] + ["a" + s for s in SUFFIXES]))


class Documents(Program):
    @classmethod
    def setUpClass(cls):
        schema = json.loads((SOURCE / "io/write/result.schema.json").read_text())
        jsonschema.Draft202012Validator.check_schema(schema)
        cls.validator = jsonschema.Draft202012Validator(schema)

    def test_examples_satisfy_the_schema(self):
        cases = sorted((SOURCE / "examples").glob("*.toml"))
        self.assertTrue(cases)
        result = self.run_it("solve", "--json", "--out", "x", *cases, self.case("b.toml", BROKEN))
        document = json.loads(result.stdout)
        self.validator.validate(document)
        self.assertEqual(len(document["cases"]), len(cases) + 1)
        for path, entry in zip(cases, document["cases"]):
            self.assertIsNotNone(entry["result"], path)
            written = json.loads((self.folder / "x" / (path.stem + ".json")).read_text())
            self.validator.validate(written)
            self.assertEqual(written, entry["result"])
            digest = hashlib.sha256(path.read_bytes()).hexdigest()
            self.assertEqual(written["provenance"]["case_sha256"], digest)

    def test_growth_satisfies_its_schema(self):
        schema = json.loads((SOURCE / "io/write/growth.schema.json").read_text())
        jsonschema.Draft202012Validator.check_schema(schema)
        validator = jsonschema.Draft202012Validator(schema)
        for name, more in (("cracked-hanger", ["--to", "12 mm"]), ("cracked-vane", ["--to", "1 in", "--kinked"])):
            case = SOURCE / "examples" / f"{name}.toml"
            result = self.run_it("grow", case, *more, "--steps", "6", "--json", "--out", "x")
            document = json.loads(result.stdout)
            validator.validate(document)
            self.assertEqual(len(document["steps"]), 6)
            self.assertEqual(json.loads((self.folder / "x" / f"{name}-grow.json").read_text()), document)
            self.assertEqual(document["case_sha256"], hashlib.sha256(case.read_bytes()).hexdigest())
        for change in ({"path": "round"}, {"steps": []}, {"extra": 1}):
            self.assertFalse(validator.is_valid(document | change), change)

    def test_schema_refuses_what_is_not_a_result(self):
        self.run_it("solve", self.case("strap.toml", GOOD))
        good = json.loads((self.folder / "strap.json").read_text())
        self.validator.validate(good)

        def broken(change):
            document = copy.deepcopy(good)
            change(document)
            return document

        hole = lambda d: d["results"][0]["holes"][0]
        for change in [
            lambda d: hole(d)["kt_net"].update(value=None),
            lambda d: hole(d)["largest_edge_stress"].pop("bound"),
            lambda d: hole(d)["largest_edge_stress"].update(unit="psi"),
            lambda d: hole(d)["largest_edge_stress"].update(extra=1),
            lambda d: d.update(status="not met"),
            lambda d: d["checks"]["reaction"].update(value=None),
            lambda d: d["provenance"].update(case_sha256="abc"),
        ]:
            self.assertFalse(self.validator.is_valid(broken(change)))

    def test_same_case_same_numbers(self):
        self.case("strap.toml", GOOD)
        documents = []
        for _ in range(2):
            text = self.run_it("solve", "--json", "--no-files", "strap.toml").stdout
            document = json.loads(text)["cases"][0]["result"]
            for timed in [document["discretisation"], *document["levels"]]:
                timed.pop("time")
            documents.append(document)
        self.assertEqual(*documents)
        self.assertEqual(self.names(), ["strap.toml"])


if __name__ == "__main__":
    unittest.main(argv=sys.argv[:1] + sys.argv[3:], verbosity=1)
