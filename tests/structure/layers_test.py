"""Reads the #include lines of the four layers and reports every one that is not allowed.

Rules:
- includes go one way: mesh <- solver <- validation <- io;
- our own files are included by their path from the project's top, never relative;
- a heavy library's headers appear in no header of ours, and in no more source files than HEAVY allows;
- a source file with a header of the same name includes it first, so that the header is compiled alone.
"""

import pathlib
import re
import sys
import tempfile
import unittest

TOP = pathlib.Path(__file__).resolve().parents[2]
LAYERS = ["mesh", "solver", "validation", "io"]
INCLUDE = re.compile(r'^\s*#\s*include\s*([<"])([^>"]+)[>"]')

# What is heavy: how its headers are recognised, and how many source files may include them.
HEAVY = {
    "Gmsh": (re.compile(r"^gmsh\.h"), 2),
    "VTK": (re.compile(r"^vtk\w+\.h"), 2),
    "toml++": (re.compile(r"^toml(\+\+|plusplus)?[./]"), 2),
    "CLI11": (re.compile(r"^CLI/"), 2),
    "JSON": (re.compile(r"^nlohmann/"), 2),
    "Cairo": (re.compile(r"^cairo"), 2),
    "libpng": (re.compile(r"^png\.h"), 1),
}


def includes(path):
    """(line number, '<' or '"', file) of every include line of a file."""
    for number, line in enumerate(path.read_text(encoding="utf-8").splitlines(), 1):
        match = INCLUDE.match(line)
        if match:
            yield number, match[1], match[2]


def layer_faults(top, layer, path):
    allowed = LAYERS[: LAYERS.index(layer) + 1]
    for number, quote, name in includes(path):
        first = name.split("/")[0]
        where = f"{path.relative_to(top)}:{number}: includes {name}"
        if first in LAYERS and first not in allowed:
            yield f"{where}: {layer} must not know {first}; it may include {', '.join(allowed)}"
        elif quote == '"' and first not in LAYERS:
            yield f'{where}: not a path from the project\'s top; write "<layer>/.../file.hpp", or <...> for a library'
        elif quote == '"' and not (top / name).is_file():
            yield f"{where}: there is no such file"


def own_header_faults(top, path):
    header = path.with_suffix(".hpp")
    if path.suffix != ".cpp" or not header.is_file():
        return
    first = next(iter(includes(path)), None)
    own = str(header.relative_to(top))
    if first is None or first[2] != own:
        yield f"{path.relative_to(top)}: its first include must be {own}, so that this header is seen to compile alone"


def heavy_faults(top, files):
    for library, (pattern, most) in HEAVY.items():
        users = [p for p in files if any(pattern.match(name) for _, _, name in includes(p))]
        for path in users:
            if path.suffix == ".hpp":
                yield f"{path.relative_to(top)}: a header includes {library}; hide it behind a header of our own"
        sources = [str(p.relative_to(top)) for p in users if p.suffix == ".cpp"]
        if len(sources) > most:
            yield f"{library} is included by {len(sources)} source files, allowed {most}: {', '.join(sources)}"


def faults(top):
    found, files = [], []
    for layer in LAYERS:
        own = [p for p in sorted((top / layer).rglob("*")) if p.suffix in (".hpp", ".cpp")]
        for path in own:
            found += layer_faults(top, layer, path)
            found += own_header_faults(top, path)
        files += own
    return found + list(heavy_faults(top, files)), files


class TheProject(unittest.TestCase):
    def test_obeys_every_rule(self):
        found, files = faults(TOP)
        self.assertGreater(len(files), 10, "the layers' files were not found")
        self.assertEqual([], found, "\n" + "\n".join(found))


class APlantedFault(unittest.TestCase):
    """The checks themselves, on a small tree with one fault."""

    def found_with(self, extra):
        with tempfile.TemporaryDirectory() as name:
            top = pathlib.Path(name)
            tree = {
                "mesh/a.hpp": "#include <vector>\n",
                "mesh/a.cpp": '#include "mesh/a.hpp"\n\n#include <gmsh.h>\n',
                "solver/b.hpp": '#include "mesh/a.hpp"\n',
                "io/c.cpp": '#include "solver/b.hpp"\n',
            }
            for path, text in {**tree, **extra}.items():
                (top / path).parent.mkdir(parents=True, exist_ok=True)
                (top / path).write_text(text)
            return faults(top)[0]

    def expect(self, extra, words):
        found = self.found_with(extra)
        self.assertEqual(1, len(found), found)
        self.assertIn(words, found[0])

    def test_none(self):
        self.assertEqual([], self.found_with({}))

    def test_back_include(self):
        self.expect({"mesh/d.cpp": '#include "solver/b.hpp"\n'}, "mesh/d.cpp:1: includes solver/b.hpp: mesh must not know")

    def test_back_include_in_angle_brackets(self):
        self.expect({"solver/d.cpp": "\n# include <io/c.hpp>\n"}, "solver/d.cpp:2: includes io/c.hpp")

    def test_relative_include(self):
        self.expect({"io/d.cpp": '#include "../mesh/a.hpp"\n'}, "not a path from the project's top")

    def test_missing_file(self):
        self.expect({"io/d.cpp": '#include "mesh/gone.hpp"\n'}, "no such file")

    def test_heavy_header_in_a_header(self):
        self.expect({"io/d.hpp": "#include <toml++/toml.h>\n"}, "a header includes toml++")

    def test_heavy_header_in_too_many_sources(self):
        more = {"mesh/d.cpp": "#include <gmsh.h>\n", "mesh/e.cpp": "#include <gmsh.h>\n"}
        self.expect(more, "Gmsh is included by 3 source files, allowed 2")

    def test_own_header_not_first(self):
        self.expect({"solver/b.cpp": '#include "mesh/a.hpp"\n#include "solver/b.hpp"\n'}, "must be solver/b.hpp")


if __name__ == "__main__":
    sys.dont_write_bytecode = True
    unittest.main()
