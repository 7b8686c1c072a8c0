"""Checks the JSON that case_schema.c prints against docs/cases.schema.json, with the validator
jsonschema (J. Berman, an implementation of the JSON Schema specification; Debian:
python3-jsonschema).
"""

import json
import pathlib
import subprocess
import sys

try:
    import jsonschema
except ImportError:
    print("skipped: jsonschema (python3-jsonschema) is not installed")
    sys.exit(77)


def main():
    root = pathlib.Path(__file__).resolve().parent.parent.parent
    schema = json.loads((root / "docs" / "cases.schema.json").read_text())
    validator = jsonschema.validators.validator_for(schema)(schema)
    validator.check_schema(schema)
    lines = subprocess.run(sys.argv[1:], check=True, capture_output=True, text=True).stdout.splitlines()
    wrong = 0
    realisable = 0
    for line in lines:
        case = json.loads(line)
        realisable += case["realisable"]
        for error in validator.iter_errors(case):
            wrong += 1
            print(f"{case.get('case')}: {error.message}")
    print(f"{len(lines)} cases, {realisable} realisable, {wrong} errors")
    # the schema must be one that can fail
    broken = json.loads(lines[0])
    del broken["regions"]
    return 1 if wrong or not realisable or validator.is_valid(broken) else 0


sys.exit(main())
