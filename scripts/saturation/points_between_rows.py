#!/usr/bin/env python3
"""Ask the CoolProp library for points between the rows of saturation.json.

The tests hold the interpolation against them (tests/published/saturation.test.ts).
For every refrigerant: midpoints between two rows, every 6 K and close to the upper
end, in the columns of the table. A point at which the library itself does not
converge is left out, as it is in the table.

To make it anew: python3 scripts/saturation/points_between_rows.py tests/published/saturation-between-rows.json

Needs: Python 3, CoolProp 8.0.0.  Usage: points_between_rows.py OUT.json
Source: Bell, Wronski, Quoilin, Lemort, Ind. Eng. Chem. Res. 53 (2014) 2498.
"""
import json
import pathlib
import sys

import CoolProp
import CoolProp.CoolProp as CP

from saturation_table import BLENDS, PURE, blend_state, saturation_row

TABLE = pathlib.Path(__file__).parents[2] / "shared/refrigerants/data/saturation.json"
SPACING = 6  # K between two points
LAST_ROWS = 5  # rows at the upper end, where the curves bend most, with a point beside each


def midpoints(rows):
    """Return temperatures [degC] halfway between rows, the whole step of a gap included."""
    lowest, highest = rows[0][0], rows[-1][0]
    regular = range(lowest + 1, highest, SPACING)
    final = range(highest - 2 * LAST_ROWS + 1, highest, 2)
    return sorted({celsius for celsius in (*regular, *final) if lowest < celsius < highest})


def main(path):
    tables = json.loads(TABLE.read_text(encoding="utf-8"))["refrigerants"]
    points = {}
    for name, table in tables.items():
        if name in PURE:
            state = CP.AbstractState("HEOS", PURE[name])
        else:
            state, _ = blend_state(BLENDS[name])
        rows = (saturation_row(state, celsius) for celsius in midpoints(table["rows"]))
        points[name] = [row for row in rows if row]
    document = {"source": f"CoolProp {CoolProp.__version__}", "points": points}
    with open(path, "w", encoding="utf-8") as out:
        json.dump(document, out, separators=(",", ":"))
        out.write("\n")


if __name__ == "__main__":
    main(sys.argv[1])
