"""Reads a DXF file with ezdxf and prints what it saw as JSON.

Polylines are taken apart by ezdxf itself (virtual_entities), so arcs are the
arcs that ezdxf makes of the bulges. Usage: ezdxf_read.py FILE
"""
import json
import sys

import ezdxf
from ezdxf.math import Vec3


def ends(points):
    return [{"x": p[0], "y": p[1], "bulge": 0} for p in points]


def simple(e):
    """The entity as a dictionary; e is LINE, ARC, CIRCLE or SPLINE."""
    out = {"kind": e.dxftype(), "layer": e.dxf.layer}
    if e.dxftype() == "LINE":
        out["vertices"] = ends([e.dxf.start, e.dxf.end])
    elif e.dxftype() == "SPLINE":
        out["vertices"] = ends([Vec3(p) for p in e.control_points])
    else:
        c = e.ocs().to_wcs(e.dxf.center)
        out["center"] = {"x": c.x, "y": c.y, "bulge": 0}
        out["radius"] = e.dxf.radius
        if e.dxftype() == "ARC":
            out["from"], out["to"] = e.dxf.start_angle % 360, e.dxf.end_angle % 360
    return out


doc = ezdxf.readfile(sys.argv[1])
audit = doc.audit()
entities, parts = [], []
for e in doc.modelspace():
    if e.dxftype() in ("LWPOLYLINE", "POLYLINE"):
        closed = e.closed if e.dxftype() == "LWPOLYLINE" else e.is_closed
        if e.dxftype() == "LWPOLYLINE":
            vs = [{"x": x, "y": y, "bulge": b} for x, y, b in e.get_points("xyb")]
        else:
            vs = [{"x": v.dxf.location.x, "y": v.dxf.location.y, "bulge": v.dxf.bulge} for v in e.vertices]
        entities.append({"kind": e.dxftype(), "layer": e.dxf.layer, "closed": bool(closed), "vertices": vs})
        parts.append([simple(v) for v in e.virtual_entities()])
    else:
        entities.append(simple(e))
        parts.append([simple(e)])

header = doc.header
json.dump(
    {
        "version": doc.dxfversion,
        "insunits": header.get("$INSUNITS", -1),
        "measurement": header.get("$MEASUREMENT", -1),
        "extmin": list(header["$EXTMIN"])[:2],
        "extmax": list(header["$EXTMAX"])[:2],
        "errors": [e.message for e in audit.errors],
        "fixes": [e.message for e in audit.fixes],
        "layers": sorted(l.dxf.name for l in doc.layers),
        "entities": entities,
        "parts": parts,
    },
    sys.stdout,
)
