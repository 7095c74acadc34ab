// Reads a DXF file with dxf-parser and prints the entities as JSON.
// Usage: node dxfparser_read.js FILE; NODE_PATH holds the module.
'use strict';
const fs = require('fs');
const DxfParser = require('dxf-parser');

const dxf = new DxfParser().parseSync(fs.readFileSync(process.argv[2], 'utf8'));
const vertex = (v) => ({ x: v.x, y: v.y, bulge: v.bulge || 0 });
const degrees = (a) => (((a * 180) / Math.PI) % 360 + 360) % 360;

const entities = dxf.entities.map((e) => {
  const out = { kind: e.type, layer: e.layer };
  switch (e.type) {
    case 'LWPOLYLINE':
    case 'POLYLINE':
      out.closed = Boolean(e.shape);
      out.vertices = e.vertices.map(vertex);
      break;
    case 'LINE':
      out.vertices = e.vertices.map(vertex);
      break;
    case 'SPLINE':
      out.vertices = e.controlPoints.map(vertex);
      break;
    case 'ARC':
      out.from = degrees(e.startAngle);
      out.to = degrees(e.endAngle);
    // falls through
    case 'CIRCLE':
      out.center = vertex(e.center);
      out.radius = e.radius;
  }
  return out;
});
const header = dxf.header;
process.stdout.write(JSON.stringify({
  version: header.$ACADVER,
  insunits: header.$INSUNITS ?? -1,
  measurement: header.$MEASUREMENT ?? -1,
  extmin: [header.$EXTMIN.x, header.$EXTMIN.y],
  extmax: [header.$EXTMAX.x, header.$EXTMAX.y],
  layers: Object.keys(dxf.tables.layer.layers).sort(),
  entities,
}));
