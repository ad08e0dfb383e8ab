import { GROUND_FLAGS, GROUND_STATES } from '#shared/domain/ground-state.ts'
import { OVERLAY_MARKS, STEP_EDGE, STIPPLE_DOTS, stateLook, type Hatch } from '#shared/look/ground-look.ts'
import { SHEET_COLOURS, type Theme } from '#shared/look/theme.ts'
import type { Rgb } from '#shared/look/colour.ts'
import { CHANGE_SLOTS, HIGHLIGHT_BIT, SELECTED_BIT } from './board-texture.ts'

export const VERTEX_SHADER = `#version 300 es
uniform mat4 u_matrix;
layout(location = 0) in vec2 a_position;
layout(location = 1) in vec2 a_place;
out vec2 v_place;
void main() {
  v_place = a_place;
  gl_Position = u_matrix * vec4(a_position, 0.0, 1.0);
}`

const number = (value: number): string => (Number.isInteger(value) ? `${value}.0` : String(value))

/** Lines repeat every `spacing` along an axis; slanted ones lie nearer to each other by √2. */
function hatchBody(hatch: Hatch): string {
  const spacing = number(hatch.spacing)
  const slanted = number(hatch.spacing / Math.SQRT2)
  const half = number(hatch.stroke / 2)
  const line = (place: string, every: string): string => `band(${place}, ${every}, ${half})`
  const rising = line('(h.x + h.y) * 0.70710678', slanted)
  switch (hatch.kind) {
    case 'none':
      return '0.0'
    case 'stipple':
      return `stipple(h, ${spacing})`
    case 'diagonals':
    case 'sparse-diagonals':
      return rising
    case 'horizontals':
      return line(`h.y + ${number(hatch.spacing / 2)}`, spacing)
    case 'thin-verticals':
    case 'verticals':
      return line(`h.x + ${number(hatch.spacing / 2)}`, spacing)
    case 'cross-hatch':
      return `max(${rising}, ${line('(h.x - h.y) * 0.70710678', slanted)})`
  }
}

function hatchSwitch(): string {
  const cases = GROUND_STATES.map((state, code) => `case ${code}: return ${hatchBody(stateLook(state).hatch)};`)
  return `float hatch(int state, vec2 h) {\n  switch (state) {\n    ${cases.join('\n    ')}\n  }\n  return 0.0;\n}`
}

function stippleFunction(): string {
  const dots = STIPPLE_DOTS.map(
    ([x, y, radius]) => `c = max(c, cover(distance(p, vec2(${number(x)}, ${number(y)}) * size), ${number(radius)} * size));`,
  )
  return `float stipple(vec2 h, float size) {\n  vec2 p = mod(h, size);\n  float c = 0.0;\n  ${dots.join('\n  ')}\n  return c;\n}`
}

const nearHatch = stateLook('meets-spec').nearHatch
const dash = stateLook('not-placed').cellLine.dash
const dashOn = number(dash[0] ?? 2)
const dashEvery = number((dash[0] ?? 2) + (dash[1] ?? 3))
const [doubtOn, doubtOff] = OVERLAY_MARKS.doubt.dash
/** Corner mark of a release that waits for acceptance: a small open square, lower left. Pixels. */
const WAITING = { inset: 3.5, side: 7, line: 1.3 }
/** Outlines of chosen cells and of cells a result would turn to rework. Pixels. */
const OUTLINE = { chosen: 2.2, casing: 1.8, preview: 2.4 }

/**
 * All lengths are CSS pixels; `cover` turns a distance into how much of the device pixel a stroke fills.
 * h runs right and down from the projected centre of the site, so that hatches ride with the ground while panning
 * and stay upright and of one size otherwise.
 */
export const FRAGMENT_SHADER = `#version 300 es
precision highp float;
precision highp int;
precision highp usampler2D;
uniform usampler2D u_cells;
uniform ivec2 u_size;
uniform vec2 u_anchor;
uniform float u_ratio;
uniform vec3 u_fill[${GROUND_STATES.length}];
uniform vec3 u_mark[${GROUND_STATES.length}];
uniform vec3 u_near[${GROUND_STATES.length}];
uniform vec4 u_line[${GROUND_STATES.length}];
uniform float u_lineWidth[${GROUND_STATES.length}];
uniform vec3 u_ink;
uniform vec3 u_sheetInk;
uniform vec3 u_preview;
uniform vec4 u_front[${CHANGE_SLOTS + 1}];
in vec2 v_place;
out vec4 result;

float cover(float d, float reach) { return clamp((reach - d) * u_ratio + 0.5, 0.0, 1.0); }
float band(float x, float spacing, float halfWidth) {
  return cover(abs(mod(x + 0.5 * spacing, spacing) - 0.5 * spacing), halfWidth);
}
${stippleFunction()}
${hatchSwitch()}
void lay(inout vec4 under, vec3 colour, float share) { under = under * (1.0 - share) + vec4(colour, 1.0) * share; }
bool bare(int state) { return state <= 1; }
int texel(ivec2 cell, int channel) {
  if (any(lessThan(cell, ivec2(0))) || any(greaterThanEqual(cell, u_size))) return 0;
  return int(texelFetch(u_cells, cell, 0)[channel]);
}

// fill, hatch and the lines between cells of one state, p from the top left, q from the bottom right corner
vec4 ground(int state, int flags, vec2 h, vec2 p, vec2 q, vec2 cellPx) {
  vec4 c = vec4(0.0);
  bool quarterOut = (flags & ${GROUND_FLAGS.partial}) != 0 && p.x > q.x && p.y > q.y;
  int shown = quarterOut ? 1 : state;
  if (!bare(shown)) {
    lay(c, u_fill[shown], 1.0);
    lay(c, u_mark[shown], hatch(shown, h));
    if ((flags & ${GROUND_FLAGS.near}) != 0)
      lay(c, u_near[shown], band(h.y + ${number(nearHatch.spacing / 2)}, ${number(nearHatch.spacing)}, ${number(nearHatch.stroke / 2)}));
  }
  vec2 d = min(p, q);
  if ((flags & ${GROUND_FLAGS.partial}) != 0) {
    vec2 m = abs(p - q) * 0.5;
    if (p.x > q.x && p.y > q.y) d = min(d, m);
    else if (p.y > q.y) d.x = min(d.x, m.x);
    else if (p.x > q.x) d.y = min(d.y, m.y);
  }
  float fade = smoothstep(3.0, 9.0, min(cellPx.x, cellPx.y));
  float dotted = shown == 1 ? 1.0 : 0.0;
  vec2 on = mix(vec2(1.0), vec2(step(mod(p.y, ${dashEvery}), ${dashOn}), step(mod(p.x, ${dashEvery}), ${dashOn})), dotted);
  float width = u_lineWidth[shown] * 0.5;
  float line = max(cover(d.x, width) * on.x, cover(d.y, width) * on.y);
  lay(c, u_line[shown].rgb, line * u_line[shown].a * fade);
  return c;
}

// one side of a cell: d away from it, a along it, side its length, code as in board-texture
float stepEdge(int code, float d, float a, float side) {
  if (code == 0) return 0.0;
  float c = cover(d, ${number(STEP_EDGE.line / 2)});
  if (code == 2) {
    float parts = max(2.0, floor(side / ${number(STEP_EDGE.pitch)} + 0.5));
    float i = floor(a / side * parts + 0.5);
    float reach = mod(i, 2.0) > 0.5 ? ${number(STEP_EDGE.longLength)} : ${number(STEP_EDGE.shortLength)};
    float across = abs(a - i * side / parts);
    float inner = step(0.5, i) * step(i, parts - 0.5) * smoothstep(9.0, 15.0, side);
    c = max(c, cover(across, ${number(STEP_EDGE.hachure / 2)}) * cover(d, reach) * inner);
  }
  return c;
}

// distance from the nearest side across which the bit is not set
float regionEdge(ivec2 cell, int bit, vec2 p, vec2 q) {
  float d = 1e6;
  if ((texel(cell + ivec2(0, -1), 1) & bit) == 0) d = min(d, p.y);
  if ((texel(cell + ivec2(1, 0), 1) & bit) == 0) d = min(d, q.x);
  if ((texel(cell + ivec2(0, 1), 1) & bit) == 0) d = min(d, q.y);
  if ((texel(cell + ivec2(-1, 0), 1) & bit) == 0) d = min(d, p.x);
  // across a corner, so that the line turns inward without a gap
  if ((texel(cell + ivec2(-1, -1), 1) & bit) == 0) d = min(d, max(p.x, p.y));
  if ((texel(cell + ivec2(1, -1), 1) & bit) == 0) d = min(d, max(q.x, p.y));
  if ((texel(cell + ivec2(1, 1), 1) & bit) == 0) d = min(d, max(q.x, q.y));
  if ((texel(cell + ivec2(-1, 1), 1) & bit) == 0) d = min(d, max(p.x, q.y));
  return d;
}

void marks(inout vec4 c, int state, int flags, vec2 p, vec2 q, vec2 cellPx) {
  float side = min(cellPx.x, cellPx.y);
  float edge = min(min(p.x, p.y), min(q.x, q.y));
  vec3 ink = bare(state) ? u_sheetInk : u_ink;
  if ((flags & ${GROUND_FLAGS.doubt}) != 0) {
    float along = edge == p.x || edge == q.x ? p.y : p.x;
    float on = step(mod(along, ${number(doubtOn + doubtOff)}), ${number(doubtOn)});
    lay(c, ink, on * cover(abs(edge - 2.6), ${number(OVERLAY_MARKS.doubt.edge / 2)}) * smoothstep(9.0, 15.0, side));
  }
  if ((flags & ${GROUND_FLAGS.covered}) != 0) {
    float wedge = min(side * ${number(OVERLAY_MARKS.covered.wedgeShare)}, ${number(OVERLAY_MARKS.covered.wedgeMax)});
    lay(c, ink, cover(edge, min(${number(OVERLAY_MARKS.covered.edge)}, side * 0.15)));
    lay(c, ink, cover((p.x + p.y) * 0.70710678, (wedge + ${number(OVERLAY_MARKS.covered.edge)}) * 0.70710678));
  }
  if ((flags & ${GROUND_FLAGS.hold}) != 0) {
    float corner = min(side * ${number(OVERLAY_MARKS.hold.cornerShare)}, ${number(OVERLAY_MARKS.hold.cornerMax)});
    float away = (q.x + p.y) * 0.70710678;
    lay(c, vec3(1.0), cover(away, corner * 0.70710678));
    lay(c, u_ink, cover(away, corner * 0.5 * 0.70710678));
    lay(c, u_ink, cover(abs(away - corner * 0.70710678), 0.5));
  }
  if ((flags & ${GROUND_FLAGS.awaitingAcceptance}) != 0 && side > 14.0) {
    vec2 m = abs(vec2(p.x, q.y) - ${number(WAITING.inset + WAITING.side / 2)});
    float box = max(m.x, m.y);
    lay(c, vec3(1.0), cover(box, ${number(WAITING.side / 2)}));
    lay(c, u_ink, cover(abs(box - ${number(WAITING.side / 2 - WAITING.line / 2)}), ${number(WAITING.line / 2)}));
  }
}

void main() {
  ivec2 cell = ivec2(floor(v_place));
  vec2 perPx = vec2(length(vec2(dFdx(v_place.x), dFdy(v_place.x))), length(vec2(dFdx(v_place.y), dFdy(v_place.y)))) * u_ratio;
  if (any(lessThan(cell, ivec2(0))) || any(greaterThanEqual(cell, u_size))) discard;
  uvec4 t = texelFetch(u_cells, cell, 0);
  int state = int(t.r & 15u);
  int flags = int(t.g);
  vec2 cellPx = 1.0 / max(perPx, vec2(1e-9));
  vec2 f = v_place - vec2(cell);
  vec2 p = f * cellPx;
  vec2 q = (1.0 - f) * cellPx;
  vec2 h = vec2(gl_FragCoord.x - u_anchor.x, u_anchor.y - gl_FragCoord.y) / u_ratio;

  vec4 c = ground(state, flags, h, p, q, cellPx);
  marks(c, state, flags, p, q, cellPx);
  int slot = int(t.a & 3u);
  if (slot > 0) {
    vec4 front = u_front[slot];
    float ahead = distance(v_place / perPx, front.xy / perPx) - front.z / max(perPx.x, perPx.y);
    float old = clamp(ahead / 5.0 + 0.5, 0.0, 1.0) * front.w;
    if (old > 0.0) {
      int oldState = int(t.r >> 4);
      int oldFlags = int(t.a >> 2);
      vec4 before = ground(oldState, oldFlags, h, p, q, cellPx);
      marks(before, oldState, oldFlags, p, q, cellPx);
      c = mix(c, before, old);
    }
  }

  int edges = int(t.b);
  vec3 ink = bare(state) ? u_sheetInk : u_ink;
  float e = max(max(stepEdge(edges & 3, p.y, p.x, cellPx.x), stepEdge((edges >> 2) & 3, q.x, p.y, cellPx.y)),
    max(stepEdge((edges >> 4) & 3, q.y, p.x, cellPx.x), stepEdge((edges >> 6) & 3, p.x, p.y, cellPx.y)));
  lay(c, ink, e);

  if ((flags & ${HIGHLIGHT_BIT}) != 0) {
    float d = regionEdge(cell, ${HIGHLIGHT_BIT}, p, q);
    lay(c, vec3(1.0), cover(d, ${number(OUTLINE.preview + 1.2)}));
    lay(c, u_preview, cover(d, ${number(OUTLINE.preview)}));
  }
  if ((flags & ${SELECTED_BIT}) != 0) {
    float d = regionEdge(cell, ${SELECTED_BIT}, p, q);
    lay(c, vec3(1.0), cover(d, ${number(OUTLINE.chosen + OUTLINE.casing)}));
    lay(c, u_ink, cover(d, ${number(OUTLINE.chosen)}));
  }
  result = c;
}`

const flat = (colours: readonly Rgb[]): Float32Array => new Float32Array(colours.flat().map((channel) => channel / 255))

export interface BoardPalette {
  readonly fill: Float32Array
  readonly mark: Float32Array
  readonly near: Float32Array
  readonly line: Float32Array
  readonly lineWidth: Float32Array
  readonly ink: Float32Array
  readonly sheetInk: Float32Array
  readonly preview: Float32Array
}

/** The shared look of every state as the arrays the shader takes. */
export function boardPalette(theme: Theme): BoardPalette {
  const looks = GROUND_STATES.map((state) => stateLook(state, theme))
  return {
    fill: flat(looks.map((look) => look.fill.rgb)),
    mark: flat(looks.map((look) => look.hatch.mark.rgb)),
    near: flat(looks.map((look) => look.nearHatch.mark.rgb)),
    line: new Float32Array(
      looks.flatMap(({ cellLine }) => [...cellLine.colour.rgb.map((channel) => channel / 255), cellLine.opacity]),
    ),
    lineWidth: new Float32Array(looks.map((look) => look.cellLine.width)),
    // ground keeps its hues in both themes, so what is drawn on it keeps the dark ink
    ink: flat([SHEET_COLOURS.light.ink.rgb]),
    sheetInk: flat([SHEET_COLOURS[theme].ink.rgb]),
    preview: flat([stateLook('rework').hatch.mark.rgb]),
  }
}
