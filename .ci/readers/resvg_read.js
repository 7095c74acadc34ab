// Renders an SVG file with resvg and prints the size and the filled pixels.
// Usage: node resvg_read.js FILE PIXELS_PER_MM; NODE_PATH holds the module.
'use strict';
const fs = require('fs');
const { Resvg } = require('@resvg/resvg-js');

const resvg = new Resvg(fs.readFileSync(process.argv[2], 'utf8'), {
  dpi: 25.4 * Number(process.argv[3]),
  font: { loadSystemFonts: false },
});
const image = resvg.render();
const pixels = image.pixels; // a copy at each call
let alpha = 0;
for (let i = 3; i < pixels.length; i += 4) alpha += pixels[i];
process.stdout.write(JSON.stringify({
  width: resvg.width, height: resvg.height,
  pixelWidth: image.width, pixelHeight: image.height,
  filled: alpha / 255,
}));
