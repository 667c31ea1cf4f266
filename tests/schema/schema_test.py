"""Holds the JSON Schema of the case format against the reader.

Both must say the same of every case in examples/ and tests/io/cases/, and of
some thousands of mutations of the good ones: each key left out, misspelt, or
given each of a list of wrong values. What a schema cannot know (names that
must exist or be unique, geometry, balance, magnitudes) is told apart by the
reader's message.

usage: schema_test.py READ_VERDICTS
"""

import copy
import json
import pathlib
import shutil
import subprocess
import sys
import tempfile
import tomllib

import jsonschema

TOP = pathlib.Path(__file__).resolve().parents[2]
SCHEMA = TOP / "io/case/case.schema.json"

VALUES = [True, 5, 0.25, -3, 0, [], ["5 mm"], ["1 mm", "2 mm"], {}, [{}], "", " ", "5", "5 mm", "-5 mm", "0 mm", "5.5.5 mm",
          "5 MPa", "-5 MPa", "0 MPa", "5 kN", "5 N m", "5 kip in", "30 deg", "5 %", "5 furlong", "circle", "slot",
          "ellipse", "rounded rectangle", "tension", "shear", "bending", "pressure", "edge", "across", "left",
          "plane strain", "von Mises", "a\tb", "1e3 mm", ".5 mm", "5. mm", "5 m m", "5mm", "5 Nm", "5 N*m", "5 in"]

# Faults that no schema can express, by a part of the reader's message.
BEYOND = ["is taken", "does not lead into the material", "is beyond the end of the", "away from that edge",
          "magnitude is outside", "all loads", "nothing is asked for", "is too large: strain energy",
          "its yield strength of", "the edge runs from 0 to", "the loaded part ends where", "the shares add up to",
          "shares for", "is named twice", "holds the corner", "is held by", "round hole",
          "small displacements cover", "must not be negative", "the ends differ", "have the same number of entries",
          "no straight edge", "at and holes say the same", "as near to this place", " mm away; give a place",
          "lies nearest to this place is called", "says that its unit is", ".dxf:", "the part has no", "nothing on the plate raises"]
BEYOND_KEYS = ["load.hole = ", "load.crack = ", "load.edge = ", "notch.edge = ", "crack.from = ", "crack.edge = ",
               "ask.holes = ", "ask.at = ", "ask.tips = ", "ask.result.hole = ", "ask.result.at = ",
               "ask.result.tip = ", "pin.hole = ", "pin.holes = ", "support.edge = "]


def is_beyond_schema(kind, message):
    unknown_name = "is not known here" in message and any(key in message for key in BEYOND_KEYS)
    ratio = "Poisson's ratio lies" in message or "a tolerance is relative" in message or "double precision gives" in message
    in_text = ' = "' in message.split("; ")[0]
    drawing = "import.file = " in message  # whatever the drawing holds
    return kind == "physics" or drawing or unknown_name or (ratio and in_text) or any(part in message for part in BEYOND)


def toml_value(value):
    if isinstance(value, bool):
        return "true" if value else "false"
    if isinstance(value, str):
        return json.dumps(value)
    if isinstance(value, list):
        return "[" + ", ".join(toml_value(item) for item in value) + "]"
    if isinstance(value, dict):
        return "{" + ", ".join(f"{json.dumps(key)} = {toml_value(item)}" for key, item in value.items()) + "}"
    return repr(value)


def toml(document):
    """The document as TOML: one line for each key of the root."""
    return "".join(f"{json.dumps(key)} = {toml_value(value)}\n" for key, value in document.items())


def tables(node, path=()):
    """Paths of all tables in a document."""
    if isinstance(node, dict):
        yield path
        for key, value in node.items():
            yield from tables(value, path + (key,))
    elif isinstance(node, list):
        for index, value in enumerate(node):
            yield from tables(value, path + (index,))


def at(document, path):
    for step in path:
        document = document[step]
    return document


def mutations(document):
    for path in tables(document):
        for key in [*at(document, path), "unknown"]:
            for change in ["remove", "rename", *VALUES]:
                mutant = copy.deepcopy(document)
                table = at(mutant, path)
                if change == "remove":
                    table.pop(key, None)
                elif change == "rename":
                    table[key + "x"] = table.pop(key, 1)
                else:
                    table[key] = change
                yield mutant


def verdicts(program, files):
    """For each file the reader's faults as (kind, message); none for a good case."""
    names = "".join(f"{file}\n" for file in files)
    out = subprocess.run([program], input=names, capture_output=True, text=True, check=True).stdout
    result = {str(file): [] for file in files}
    for line in out.splitlines():
        file, kind, *message = line.split("\t", 2)
        if kind != "ok":
            result[file].append((kind, message[0]))
    return result


def disagreement(accepts, faults):
    """Why schema and reader disagree, or None."""
    if not accepts and not faults:
        return "the schema refuses what the reader accepts"
    hard = [message for kind, message in faults if not is_beyond_schema(kind, message)]
    if accepts and hard:
        return f"the schema accepts what the reader refuses: {hard[0]}"
    return None


def check_files(validator, program):
    """The cases kept in the tree; their own marks say what the schema can know."""
    files = sorted([*TOP.glob("examples/*.toml"), *TOP.glob("tests/io/cases/*/*.toml")])
    reader = verdicts(program, files)
    problems = []
    for file in files:
        text = file.read_text(encoding="utf-8")
        try:
            document = tomllib.loads(text)
        except tomllib.TOMLDecodeError:
            if not any(words in reader[str(file)][0][1] for words in ("not TOML", "outside quotes", "nest deeper")):
                problems.append(f"{file}: not TOML, which the reader does not say")
            continue
        accepts = validator.is_valid(document)
        if accepts != (not reader[str(file)] or "# schema: accepts" in text):
            problems.append(f"{file}: the schema {'accepts' if accepts else 'refuses'} it")
    return len(files), problems


def check_mutations(validator, program, folder):
    files = {}
    for drawing in [*TOP.glob("examples/*.dxf"), *TOP.glob("tests/io/cases/good/*.dxf")]:
        shutil.copy(drawing, folder)
    for case in sorted([*TOP.glob("examples/*.toml"), *TOP.glob("tests/io/cases/good/*.toml")]):
        text = case.read_text(encoding="utf-8")
        if "# schema: no mutations" in text:  # STEP files take long to read
            continue
        for number, mutant in enumerate(mutations(tomllib.loads(text))):
            file = pathlib.Path(folder) / f"{case.stem}-{number}.toml"
            file.write_text(toml(mutant), encoding="utf-8")
            files[str(file)] = mutant
    reader = verdicts(program, list(files))
    problems = []
    refused = 0
    for file, mutant in files.items():
        accepts = validator.is_valid(mutant)
        refused += not accepts
        why = disagreement(accepts, reader[file])
        if why:
            problems.append(f"{why}\n{toml(mutant)}")
    return len(files), refused, problems


def main(program):
    schema = json.loads(SCHEMA.read_text(encoding="utf-8"))
    jsonschema.Draft7Validator.check_schema(schema)
    validator = jsonschema.Draft7Validator(schema)
    count, problems = check_files(validator, program)
    with tempfile.TemporaryDirectory() as folder:
        mutants, refused, more = check_mutations(validator, program, folder)
    problems += more
    for problem in problems[:20]:
        print(problem)
    print(f"{count} files and {mutants} mutations, {refused} refused by the schema; {len(problems)} disagreements")
    if count < 100 or refused < 1000 or mutants - refused < 100:
        print("too few cases to say anything")
        return 1
    return 1 if problems else 0


if __name__ == "__main__":
    sys.exit(main(sys.argv[1]))
