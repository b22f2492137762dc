"""The keys of a title block: those that are read, and those that are recorded but not checked."""

READ = {
    "drawing": "drawing",
    "drawing no": "drawing",
    "drawing number": "drawing",
    "dwg": "drawing",
    "dwg no": "drawing",
    "revision": "revision",
    "rev": "revision",
    "sheet": "sheet",
    "title": "title",
    "standard": "standard",
    "units": "units",
    "unit": "units",
    "tolerances": "tolerances",
    "tolerance": "tolerances",
    "general tolerances": "tolerances",
    "fastener": "fastener",
    "joint": "joint",
    "note": "note",
    "notes": "note",
    "process": "process",
}
"""Every spelling of a key that is read, and the key it stands for."""

_USUAL = """
approved, approved by, assembly, cad file, cage, cage code, change, checked, checked by, checker, class,
classification, client, coating, company, contract, contract no, copyright, customer, date, department,
dept, description, design, designed, designed by, designer, drafter, drawn, drawn by, drawn date, ecn,
eco, edges, engineer, file, file name, filename, finish, format, hardness, heat treat, heat treatment,
issue, issue date, issued, item, language, mass, material, matl, model, model file, name, next assembly,
next assy, owner, page, paint, paper, part, part name, part no, part number, plating, project,
projection, qty, quantity, release, release date, released, roughness, scale, sheet size, signature,
size, state, status, stock, surface finish, surface roughness, surface texture, surface treatment,
treatment, type, used on, volume, weight
"""
UNCHECKED = frozenset(word.strip() for word in _USUAL.split(","))
"""Usual title-block words; common practice, no source."""

REPEATABLE = frozenset({"fastener", "joint", "note", "standard", "tolerances"})


def normal_key(written: str) -> str:
    """A key in small letters, spaces folded, without points; the read keys under their one name."""
    folded = " ".join(written.lower().replace(".", " ").replace("_", " ").split())
    return READ.get(folded, folded)


def is_known(key: str) -> bool:
    """Whether a normal key is read, or recorded without being checked."""
    return key in READ or key in UNCHECKED
