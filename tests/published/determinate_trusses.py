"""Statically determinate trusses from textbooks, course notes and manuals."""

from __future__ import annotations

from math import cos, radians, sin, sqrt

from published.example import Example

HOLTZ = (
    "N. M. Holtz with H. A. Khoo and G. A. Hartley, Structural Analysis, open book, Carleton University (CIVE 3203), "
    "repository commit ecad8189, 2022"
)
FOSSEE = "Public university companion of worked code no. 3862 (FOSSEE, IIT Bombay; parent textbook not confirmed)"
BEER = "Beer & Johnston, Vector Mechanics for Engineers: Statics"

_R3 = sqrt(3)
_WARREN_HEIGHT = sqrt(84)
_K_TOP = {name: (4.0 * i, 4.0) for i, name in enumerate("abcdefg")}
_K_BOTTOM = {name: (4.0 * i, 0.0) for i, name in enumerate("nopqrst")}
_K_MIDDLE = {name: (x, 2.0) for name, x in zip("hijklm", (0.0, 4.0, 8.0, 16.0, 20.0, 24.0), strict=True)}
_WARREN_7 = {
    **{name: (4.0 * i, 0.0) for i, name in enumerate("ACEGIKMO")},
    **{name: (4.0 * i + 2, 2 * _R3) for i, name in enumerate("BDFHJLN")},
}
_SECTIONS_TOP = {f"t{i}": (8.0 * i, 10.0) for i in range(6)}
_SECTIONS_BOTTOM = {f"b{i}": (8.0 * i, 0.0) for i in range(5)}

# The numbers stand side by side, as in the sources.
# fmt: off
EXAMPLES = (
    Example(
        name="frame-like truss",
        source=f"{HOLTZ}, 3.5, truss 1",
        seen="read",
        joints={"a": (0, 2), "b": (1, 2), "c": (2, 1), "d": (2, 0), "e": (1, 0), "f": (0, 1)},
        bars="ab bc cd ed ec bf af fc fe",
        held={"a": "xy", "d": "y"},
        loads={"b": (0, -20), "c": (-10, 0), "e": (0, -10)},
        forces={
            "ab": "-10", "af": "10", "bf": "-7.071", "bc": "-21.213", "fc": "0", "fe": "7.071", "ec": "7.071",
            "cd": "-20", "ed": "0",
        },
        reactions={"a": ("10", "10"), "d": (None, "20")},
    ),
    Example(
        name="cantilever truss",
        source=f"{HOLTZ}, solution sheet of truss 3; kN, m",
        seen="read",
        joints={"a": (0, 3), "b": (4, 3), "c": (8, 3), "d": (4, 0), "e": (0, 0)},
        bars="ab bc ad bd cd ed",
        held={"a": "xy", "e": "xy"},
        loads={"c": (0, -100)},
        forces={"ab bc": "133", "ad": "167", "bd": "0", "cd": "-167", "ed": "-267"},
        reactions={"a": ("-267", "100"), "e": ("267", "0")},
    ),
    Example(
        name="K-truss of six panels",
        source=f"{HOLTZ}, solution sheet of truss 4; kN, m",
        seen="read",
        joints=_K_TOP | _K_BOTTOM | _K_MIDDLE,
        bars="ab bc cd de ef fg no op pq qr rs st ah hn bi io cj jp dq ek kr fl ls gm mt hb ho ic ip jd jq kd kq le lr "
        "mf ms",
        held={"n": "xy", "t": "y"},
        loads={"a": (0, -40), "g": (0, -40)} | dict.fromkeys("bcdef", (0, -80)),
        forces={"cd de": "-320", "jd kd": "-44.72", "jq kq": "44.72", "pq qr": "320"},
        also={
            "ab fg no st": "0", "bc ef": "-200", "ah gm": "-40", "bi fl": "20", "cj ek": "-20", "dq": "-40",
            "op rs": "200", "hn mt": "-240", "io ls": "-100", "jp kr": "-60", "hb mf": "-223.61", "ho ms": "223.61",
            "ic le": "-134.16", "ip lr": "134.16",
        },
        reactions={"n": ("0", "240"), "t": (None, "240")},
    ),
    Example(
        name="compound truss of equilateral triangles",
        source=f"{HOLTZ}, solution sheet of truss 5; kN, m",
        seen="read",
        joints={
            "a": (0, 0), "i": (2, 0), "h": (4, 0), "g": (6, 0), "f": (8, 0), "b": (1, _R3), "j": (3, _R3),
            "k": (5, _R3), "e": (7, _R3), "c": (2, 2 * _R3), "d": (6, 2 * _R3),
        },
        bars="ab bc ai bi bj cj ij ih jh cd hk kd hg kg ke ge de ef gf",
        held={"a": "xy", "f": "y"},
        loads={"i": (0, -4), "h": (0, -2), "g": (0, -4)},
        forces={
            "ab ef": "-5.774", "bc de": "-3.464", "ai gf": "2.887", "bi ge": "2.309", "bj ke": "-2.309",
            "cj kd": "3.464", "ij kg": "2.309", "ih hg": "2.887", "jh hk": "1.155", "cd": "-3.464",
        },
        reactions={"a": ("0", "5"), "f": (None, "5")},
        remark="The sheet prints 3.461 for 3.464 and letters cj as compression, against its own free body.",
    ),
    Example(
        name="polygonal top chord",
        source=f"{HOLTZ}, solution sheet of truss 6; kN, m",
        seen="read",
        joints={
            "a": (0, 0), "h": (3, 0), "g": (6, 0), "f": (9, 0), "e": (12, 0), "b": (3, 3), "c": (6, 4.5), "d": (9, 3),
        },
        bars="ab bc cd de ah hg gf fe bh hc cg cf df",
        held={"a": "xy", "e": "y"},
        loads={"h": (0, -6), "g": (0, -8), "f": (0, -2)},
        forces={"gf": "8", "cd": "-7.83", "cf": "-1.80"},
        also={
            "ab": "-12.728", "bc": "-10.062", "de": "-9.899", "ah": "9", "hg": "8", "fe": "7", "bh": "4.5",
            "hc": "1.803", "cg": "8", "df": "3.5",
        },
        reactions={"a": ("0", "9"), "e": (None, "7")},
    ),
    Example(
        name="roof truss",
        source=f"{HOLTZ}, 3.3.2; kN, m",
        seen="read",
        joints={
            "a": (0, 0), "h": (4.5, 0), "g": (9, 0), "f": (13.5, 0), "e": (18, 0), "b": (4.5, 3), "c": (9, 6),
            "d": (13.5, 3),
        },
        bars="ab bc cd de ah hg gf fe bh bg cg dg df",
        held={"a": "xy", "e": "y"},
        loads={"b": (0, -120), "c": (0, -80)},
        forces={
            "ab": "-234.4", "bc cd de": "-126.2", "ah hg": "195", "gf fe": "105", "bh dg df": "0", "bg": "-108.2",
            "cg": "60.0",
        },
        reactions={"a": ("0", "130"), "e": (None, "70")},
        remark="Figure 3.3-10 letters bg as tension; the text and equilibrium say compression.",
    ),
    Example(
        name="inclined roller and skew loads",
        source=f"{HOLTZ}, 3.6.3; kN, m",
        seen="read",
        joints={
            "1": (0, 3), "2": (4, 3), "3": (6.25, 3), "4": (4, 0), "5": (0, 0),
            "g": (4 + sin(radians(20)), -cos(radians(20))),
        },
        bars="15 12 14 45 24 23 34 4g",
        held={"1": "xy", "g": "xy"},
        loads={"2": (30, 51.962), "3": (0, -50), "5": (-20, -34.641)},
        forces={
            "15": "34.641", "12": "67.500", "14": "-97.634", "45": "20.000", "24": "51.962", "23": "37.500",
            "34": "-62.500", "4g": "-60.252",
        },
        reactions={"1": ("10.608", "-23.940")},
        units=1.5,
        remark="The roller at 4 moves along a plane at 20 degrees; the bar 4g to a held joint stands for it. It pushes "
        "along the same line, so that no force changes. Unrounded, 14 is -97.635 and the roller 60.253.",
    ),
    Example(
        name="three bars",
        source=f"{HOLTZ}, 3.6.1",
        seen="read",
        joints={"a": (0, 0), "b": (4, 3), "c": (4, 0)},
        bars="ab ac bc",
        held={"a": "xy", "c": "y"},
        loads={"b": (60, 0)},
        forces={"ab": "75", "ac": "0", "bc": "-45"},
        reactions={"a": ("-60", "-45"), "c": (None, "45")},
    ),
    Example(
        name="complex truss",
        source=f"{HOLTZ}, problem set, 10; units of P",
        seen="read",
        joints={
            "a": (0, 1), "b": (1, 1), "c": (2, 1), "d": (3, 1), "e": (0, 0), "f": (1, 0), "g": (2, 0), "h": (3, 0),
        },
        bars="ab bc cd ef fg gh be bf bh cg dh gd",
        held={"a": "xy", "e": "xy"},
        loads={"f": (0, -1), "g": (0, -1), "h": (0, -1)},
        forces={
            "ab": "6", "bc cd": "-1", "ef fg": "-3", "gh": "-4", "be": "-4.243", "bf": "1", "bh": "4.472", "cg": "0",
            "dh": "-1", "gd": "1.414",
        },
    ),
    Example(
        name="sub-divided truss",
        source=f"{HOLTZ}, problem set, 11; units of P",
        seen="read",
        joints={
            "a": (0, 2), "b": (1, 2), "c": (2, 2), "d": (3, 2), "e": (4, 2), "f": (1, 1), "g": (3, 1), "h": (0, 0),
            "i": (2, 0), "j": (4, 0),
        },
        bars="ab bc cd de hi ij ah af bf cf ci cg dg eg ej gj hf",
        held={"h": "xy", "j": "y"},
        loads=dict.fromkeys("abcde", (0, -1)),
        forces={
            "ab bc cd de": "-0.5", "hi ij": "1", "ah ej": "-1.5", "af eg": "0.707", "bf dg": "-1", "cf cg": "-0.707",
            "ci": "0", "hf gj": "-1.414",
        },
        reactions={"h": ("0", "2.5"), "j": (None, "2.5")},
    ),
    Example(
        name="Pratt truss of three panels",
        source="A. Kabaila, Structural Analysis, introductory example; kN, m",
        seen="read",
        joints={
            "0": (0, 0), "1": (0, 6), "2": (8, 0), "3": (8, 6), "4": (16, 0), "5": (16, 6), "6": (24, 0), "7": (24, 6),
        },
        bars="01 13 12 02 23 35 34 24 45 57 46 47 67",
        held={"0": "xy", "6": "y"},
        loads={"2": (0, -100), "4": (0, -150)},
        forces={
            "01": "-116.67", "13": "-155.56", "12": "194.44", "02": "0", "23": "-16.67", "35 57": "-177.78",
            "34": "27.78", "24": "155.56", "45 46": "0", "47": "222.22", "67": "-133.33",
        },
        reactions={"0": ("0", "116.67"), "6": (None, "133.33")},
        remark="The page prints magnitudes; the signs are those of equilibrium.",
    ),
    Example(
        name="through truss of four panels",
        source="M. T. Heath, Scientific Computing: An Introductory Survey, 2nd ed., McGraw-Hill 2002, computer problem "
        "2.3; tons",
        seen="memory",
        joints={
            "1": (0, 0), "2": (1, 0), "3": (1, 1), "4": (2, 1), "5": (2, 0), "6": (3, 0), "7": (3, 1), "8": (4, 0),
        },
        bars="13 12 23 34 35 25 45 47 57 56 67 78 68",
        held={"1": "xy", "8": "y"},
        loads={"2": (0, -10), "5": (0, -15), "6": (0, -20)},
        forces={
            "13": "-28.284", "12": "20", "23": "10", "34": "-30", "35": "14.142", "25": "20", "45": "0", "47": "-30",
            "57": "7.071", "56": "25", "67": "20", "78": "-35.355", "68": "25",
        },
        reactions={"1": ("0", "20"), "8": (None, "25")},
    ),
    Example(
        name="Warren truss of seven panels",
        source=f"{FOSSEE}, example 3.8; kN, m",
        seen="read",
        joints=_WARREN_7,
        bars="AC CE EG GI IK KM MO BD DF FH HJ JL LN AB BC CD DE EF FG GH HI IJ JK KL LM MN NO",
        held={"A": "xy", "O": "y"},
        loads=dict.fromkeys("BDFHJLN", (0, -10)),
        forces={"FH HJ": "-69.282", "GH HI": "-5.7735", "GI": "72.169"},
        also={
            "AC MO": "20.207", "CE KM": "49.075", "EG IK": "66.395", "BD LN": "-34.641", "DF JL": "-57.735",
            "AB NO": "-40.415", "BC MN": "28.868", "CD LM": "-28.868", "DE KL": "17.321", "EF JK": "-17.321",
            "FG IJ": "5.774",
        },
        reactions={"A": ("0", "35"), "O": (None, "35")},
    ),
    Example(
        name="Warren truss with an overhang",
        source=f"{FOSSEE}, example 3.7; kN, m",
        seen="read",
        joints={
            "A": (0, 0), "C": (3, 0), "E": (6, 0), "G": (9, 0), "B": (1.5, 1.5 * _R3), "D": (4.5, 1.5 * _R3),
            "F": (7.5, 1.5 * _R3),
        },
        bars="AC CE EG BD DF AB BC CD DE EF FG",
        held={"A": "xy", "E": "y"},
        loads={"B": (0, -40), "D": (0, -30), "G": (0, -20), "F": (-10, 0)},
        forces={
            "AC": "8.377", "CE": "-1.057", "EG": "-11.547", "BD": "-13.660", "DF": "13.094", "AB": "-36.754",
            "BC": "-9.434", "CD": "9.434", "DE": "-44.075", "EF": "-23.094", "FG": "23.094",
        },
        reactions={"A": ("10", "31.830"), "E": (None, "58.170")},
    ),
    Example(
        name="triangle with a king post",
        source=f"{FOSSEE}, example 3.3",
        seen="read",
        joints={"A": (0, 0), "C": (3, 0), "D": (6, 0), "B": (1.5, 1.5 * _R3)},
        bars="AB AC DB DC CB",
        held={"A": "xy", "D": "y"},
        loads={"B": (0, -20), "C": (0, -10)},
        forces={"AB": "-23.09", "AC": "11.55", "DB": "-20", "DC": "17.32", "CB": "11.55"},
        reactions={"A": ("0", "20"), "D": (None, "10")},
    ),
    Example(
        name="Warren truss in feet and pounds",
        source="University of Wisconsin-Stout, Statics and Strength of Materials, solution 124",
        seen="read",
        joints={
            "A": (0, 0), "B": (8, 0), "C": (16, 0), "D": (24, 0), "G": (4, _WARREN_HEIGHT), "F": (12, _WARREN_HEIGHT),
            "E": (20, _WARREN_HEIGHT),
        },
        bars="AB BC CD GF FE AG GB BF FC CE ED",
        held={"A": "xy", "D": "y"},
        loads={"G": (0, -12000), "F": (0, -20000)},
        forces={"ED": "-1.31e4", "FE": "-1.05e4", "CE": "1.31e4", "FC": "-1.31e4"},
        also={"CD": "5237", "BC": "15712", "AG": "-21822", "GB": "8729", "BF": "-8729", "AB": "8729", "GF": "-12220"},
        reactions={"A": ("0", "20000"), "D": (None, "12000")},
        remark="Printed CD 5450 and BC 15,950 are not in equilibrium with the rest; 5237 and 15,712 are.",
    ),
    Example(
        name="queen-post form under a lateral load",
        source="MATHalino, Engineering Mechanics, problem 001-mj; kN, m",
        seen="read",
        joints={"A": (0, 0), "E": (1, 0), "F": (2, 0), "D": (3, 0), "B": (1, 0.75), "C": (2, 0.75)},
        bars="AB AE BC BE CD CE CF DF FE",
        held={"A": "xy", "D": "y"},
        loads={"F": (0, -50), "C": (80, 0)},
        forces={
            "AB": "5.56", "AE": "75.56", "BC": "4.45", "BE": "-3.34", "CD": "-88.87", "CE": "5.57", "CF": "50",
            "DF FE": "71.11",
        },
        reactions={"A": ("-80", "-3.33"), "D": (None, "53.33")},
        units=2.0,
        remark="The print goes on from rounded forces.",
    ),
    Example(
        name="three-bar frame, first",
        source=f"{BEER}, chapter 6, solutions (coordinates from their ratios); kN, m",
        seen="read",
        joints={"A": (3, 7.2), "B": (0, 3.2), "C": (0, 0)},
        bars="AB BC AC",
        held={"B": "xy", "C": "x"},
        loads={"A": (48, 0)},
        forces={"AB": "180", "BC": "144", "AC": "-156"},
        reactions={"B": ("-108", "0"), "C": ("60", None)},
    ),
    Example(
        name="three-bar frame, second",
        source=f"{BEER}, chapter 6, solutions (coordinates from their ratios); kN, m",
        seen="read",
        joints={"A": (0, 5.25), "B": (3, 4), "C": (0, 0)},
        bars="AB AC BC",
        held={"A": "xy", "C": "x"},
        loads={"B": (0, -84)},
        forces={"AB": "52", "AC": "64", "BC": "-80"},
        reactions={"A": ("-48", "84"), "C": ("48", None)},
    ),
    Example(
        name="method of sections",
        source=f"{BEER}, sample problem 6.2 (geometry read, answers from memory); ft, kips",
        seen="memory",
        joints=_SECTIONS_TOP | _SECTIONS_BOTTOM,
        bars="t0-t1 t1-t2 t2-t3 t3-t4 t4-t5 b0-b1 b1-b2 b2-b3 b3-b4 b0-t0 b1-t1 b2-t2 b3-t3 b4-t4 t1-b0 t2-b1 t3-b2 "
        "t4-b3 b4-t5",
        held={"b0": "xy", "b4": "y"},
        loads={"t1": (0, -28), "t3": (0, -28), "t5": (16, 0)},
        forces={"b2-t2": "-5", "t3-t4": "-10.4"},
        also={
            "t0-t1 b3-b4 b0-t0": "0", "t1-t2": "-18.4", "t2-t3": "-14.4", "t4-t5": "16", "b0-b1": "34.4",
            "b1-b2": "30.4", "b2-b3": "26.4", "b1-t1": "-5", "b3-t3 b4-t4": "-33", "t1-b0": "-29.454",
            "t2-b1 t3-b2": "6.403", "t4-b3": "42.261", "b4-t5": "0",
        },
        reactions={"b0": ("-16", "23"), "b4": (None, "33")},
    ),
    Example(
        name="right triangle",
        source="Chapra & Canale, Numerical Methods for Engineers, 12.2",
        seen="memory",
        joints={"1": (3, _R3), "2": (0, 0), "3": (4, 0)},
        bars="12 23 13",
        held={"2": "xy", "3": "y"},
        loads={"1": (0, -1000)},
        forces={"12": "-500", "23": "433", "13": "-866"},
        reactions={"2": ("0", "250"), "3": (None, "750")},
    ),
    Example(
        name="joint displacements of a bracket",
        source=f"{HOLTZ}, 6.5; kN, m, mm^2",
        seen="read",
        joints={"a": (0, 0), "b": (4, 0), "c": (4, 3), "d": (7, 3)},
        bars="ab ac bc cd",
        held={"b": "xy", "d": "xy"},
        loads={"a": (0, -60)},
        forces={"ab": "-80", "ac": "100", "bc": "-60", "cd": "80"},
        area={"ab": 5000, "ac": 4000, "bc": 4500, "cd": 4600},
        modulus=200.0,
        displacements={"a": ("0.32", "-2.0162")},
        displacement_unit=1e-3,
        remark="The displacement along x is from a second calculation.",
    ),
    Example(
        name="bracket cooled",
        source=f"{HOLTZ}, 6.6; 30 degrees colder in ac and cd, 12e-6 per kelvin",
        seen="read",
        joints={"a": (0, 0), "b": (4, 0), "c": (4, 3), "d": (7, 3)},
        bars="ab ac bc cd",
        held={"b": "xy", "d": "xy"},
        forces={"ab ac bc cd": "0.000"},
        imposed={"ac": -30 * 12e-6 * 5, "cd": -30 * 12e-6 * 3},
        displacements={"a": (None, "4.44")},
        displacement_unit=1e-3,
    ),
    Example(
        name="bracket with a bar too long",
        source=f"{HOLTZ}, 6.6; bc 10 mm too long",
        seen="read",
        joints={"a": (0, 0), "b": (4, 0), "c": (4, 3), "d": (7, 3)},
        bars="ab ac bc cd",
        held={"b": "xy", "d": "xy"},
        forces={"ab ac bc cd": "0.000"},
        imposed={"bc": 0.010},
        displacements={"a": (None, "10")},
        displacement_unit=1e-3,
    ),
    Example(
        name="joint displacements of a cantilever",
        source=f"{HOLTZ}, 6.5; kN, m, mm^2",
        seen="read",
        joints={"a": (0, 1.8), "b": (2, 1.8), "c": (4, 0), "d": (2, 0), "e": (0, 0)},
        bars="ab bc bd be cd de",
        held={"a": "xy", "e": "xy"},
        loads={"b": (20, 0), "c": (0, -30), "d": (0, -30)},
        forces={"ab": "120", "bc": "44.85", "bd": "30", "be": "-89.69", "cd de": "-33.33"},
        area={"ab": 5000, "bc": 2500, "bd": 2500, "be": 5000, "cd": 4000, "de": 4000},
        modulus=200.0,
        displacements={"c": ("-0.167", "-1.440")},
        displacement_unit=1e-3,
    ),
)
# fmt: on
