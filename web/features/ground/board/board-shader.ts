import { GROUND_FLAGS, GROUND_STATES } from '#shared/domain/ground-state.ts'
import { OVERLAY_MARKS, STEP_EDGE, STIPPLE_DOTS, stateLook } from '#shared/look/ground-look.ts'
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

/** How deep a point lies in a dot, for a tile of side 1; near the rim (r² − d²) / 2r is r − d without a root. */
function stippleBody(): string {
  return STIPPLE_DOTS.map(([x, y, radius], index) => {
    const away = `p - vec2(${number(x)}, ${number(y)})`
    return `vec2 a${index} = ${away};\n  depth = max(depth, (${number(radius * radius)} - dot(a${index}, a${index})) * ${number(0.5 / radius)});`
  }).join('\n  ')
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
 * What a frame has to draw beside ground and step edges. Renderers without a card run both sides of every `if`, so
 * what is not on the sheet is left out of the program: panning is twice as fast there.
 */
export const SHADER_PART = { marks: 1, change: 2, regions: 4 } as const

const PART_NAMES = Object.entries(SHADER_PART).map(([name, bit]) => ({ define: name.toUpperCase(), bit }))

/**
 * All lengths are CSS pixels; `cover` turns a distance into how much of the device pixel a stroke fills.
 * h runs right and down from the projected centre of the site, so that hatches ride with the ground while panning
 * and stay upright and of one size otherwise. A hatch is up to two families of lines, each a unit vector across
 * them, the distance from one to the next and half the stroke, or a stipple. The near overlay takes the place of
 * the second family.
 */
export function fragmentShader(parts: number): string {
  const defines = PART_NAMES.filter(({ bit }) => (parts & bit) !== 0).map(({ define }) => `#define ${define}`)
  return `#version 300 es\n${defines.join('\n')}${FRAGMENT_BODY}`
}

const FRAGMENT_BODY = `
precision highp float;
precision highp int;
precision highp usampler2D;
uniform usampler2D u_cells;
uniform ivec2 u_size;
uniform vec2 u_cellPx;
uniform vec2 u_anchor;
uniform float u_ratio;
uniform vec2 u_fade;
uniform vec4 u_fill[${GROUND_STATES.length}];
uniform vec3 u_mark[${GROUND_STATES.length}];
uniform vec3 u_near[${GROUND_STATES.length}];
uniform vec4 u_lines[${GROUND_STATES.length}];
uniform vec4 u_cross[${GROUND_STATES.length}];
uniform vec2 u_shift[${GROUND_STATES.length}];
uniform vec4 u_line[${GROUND_STATES.length}];
uniform float u_lineWidth[${GROUND_STATES.length}];
uniform vec3 u_ink;
uniform vec3 u_sheetInk;
uniform vec3 u_preview;
uniform vec4 u_front[${CHANGE_SLOTS + 1}];
in vec2 v_place;
out vec4 result;

float cover(float d, float reach) { return clamp((reach - d) * u_ratio + 0.5, 0.0, 1.0); }
float band(float x, vec4 family) {
  return family.w > 0.0 ? cover(abs(mod(x + 0.5 * family.z, family.z) - 0.5 * family.z), family.w) : 0.0;
}
float stipple(vec2 h, float size) {
  vec2 p = fract(h / max(size, 1.0));
  float depth = -1.0;
  ${stippleBody()}
  return size > 0.0 ? clamp(depth * size * u_ratio + 0.5, 0.0, 1.0) : 0.0;
}
void lay(inout vec4 under, vec3 colour, float share) { under = under * (1.0 - share) + vec4(colour, 1.0) * share; }
bool bare(int state) { return state <= 1; }

// fill, hatch and the lines between cells of one state; p from the top left, q from the bottom right corner
vec4 ground(int state, int flags, vec2 h, vec2 p, vec2 q) {
  int shown = state;
  vec2 d = min(p, q);
#ifdef MARKS
  if ((flags & ${GROUND_FLAGS.partial}) != 0) {
    vec2 m = abs(p - q) * 0.5;
    if (p.x > q.x && p.y > q.y) {
      shown = 1;
      d = min(d, m);
    } else if (p.y > q.y) d.x = min(d.x, m.x);
    else if (p.x > q.x) d.y = min(d.y, m.y);
  }
#endif
  vec4 c = u_fill[shown];
  vec2 shift = u_shift[shown];
  vec4 first = u_lines[shown];
  vec4 second = u_cross[shown];
  bool near = (flags & ${GROUND_FLAGS.near}) != 0 && second.w == 0.0 && !bare(shown);
  if (near) second = vec4(0.0, 1.0, ${number(nearHatch.spacing)}, ${number(nearHatch.stroke / 2)});
  lay(c, u_mark[shown], max(band(dot(h, first.xy) + shift.x, first), stipple(h, shift.y)));
  lay(c, near ? u_near[shown] : u_mark[shown], band(dot(h, second.xy) + (near ? ${number(nearHatch.spacing / 2)} : 0.0), second));
  vec2 on = shown == 1 ? vec2(step(mod(p.y, ${dashEvery}), ${dashOn}), step(mod(p.x, ${dashEvery}), ${dashOn})) : vec2(1.0);
  float width = u_lineWidth[shown] * 0.5;
  vec4 line = u_line[shown];
  lay(c, line.rgb, max(cover(d.x, width) * on.x, cover(d.y, width) * on.y) * line.a * u_fade.x);
  return c;
}

// one side of a cell: d away from it, a along it, side its length, code as in board-texture
float stepEdge(int code, float d, float a, float side) {
  float parts = max(2.0, floor(side / ${number(STEP_EDGE.pitch)} + 0.5));
  float i = floor(a / side * parts + 0.5);
  float reach = mod(i, 2.0) > 0.5 ? ${number(STEP_EDGE.longLength)} : ${number(STEP_EDGE.shortLength)};
  float across = abs(a - i * side / parts);
  float inner = code == 2 && i > 0.5 && i < parts - 0.5 ? u_fade.y : 0.0;
  float hachure = cover(across, ${number(STEP_EDGE.hachure / 2)}) * cover(d, reach) * inner;
  return code == 0 ? 0.0 : max(cover(d, ${number(STEP_EDGE.line / 2)}), hachure);
}

#ifdef REGIONS
int flagsAt(ivec2 cell) {
  if (any(lessThan(cell, ivec2(0))) || any(greaterThanEqual(cell, u_size))) return 0;
  return int(texelFetch(u_cells, cell, 0).g);
}

// distance from the nearest side across which the bit is not set
float regionEdge(ivec2 cell, int bit, vec2 p, vec2 q) {
  float d = 1e6;
  if ((flagsAt(cell + ivec2(0, -1)) & bit) == 0) d = min(d, p.y);
  if ((flagsAt(cell + ivec2(1, 0)) & bit) == 0) d = min(d, q.x);
  if ((flagsAt(cell + ivec2(0, 1)) & bit) == 0) d = min(d, q.y);
  if ((flagsAt(cell + ivec2(-1, 0)) & bit) == 0) d = min(d, p.x);
  // across a corner, so that the line turns inward without a gap
  if ((flagsAt(cell + ivec2(-1, -1)) & bit) == 0) d = min(d, max(p.x, p.y));
  if ((flagsAt(cell + ivec2(1, -1)) & bit) == 0) d = min(d, max(q.x, p.y));
  if ((flagsAt(cell + ivec2(1, 1)) & bit) == 0) d = min(d, max(q.x, q.y));
  if ((flagsAt(cell + ivec2(-1, 1)) & bit) == 0) d = min(d, max(p.x, q.y));
  return d;
}
#endif

#ifdef MARKS
void marks(inout vec4 c, int state, int flags, vec2 p, vec2 q) {
  float side = min(u_cellPx.x, u_cellPx.y);
  float edge = min(min(p.x, p.y), min(q.x, q.y));
  vec3 ink = bare(state) ? u_sheetInk : u_ink;
  if ((flags & ${GROUND_FLAGS.doubt}) != 0) {
    float along = edge == p.x || edge == q.x ? p.y : p.x;
    float on = step(mod(along, ${number(doubtOn + doubtOff)}), ${number(doubtOn)});
    lay(c, ink, on * cover(abs(edge - 2.6), ${number(OVERLAY_MARKS.doubt.edge / 2)}) * u_fade.y);
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
#endif

vec4 cellLook(int state, int flags, vec2 h, vec2 p, vec2 q) {
  vec4 c = ground(state, flags, h, p, q);
#ifdef MARKS
  marks(c, state, flags, p, q);
#endif
  return c;
}

void main() {
  ivec2 cell = clamp(ivec2(floor(v_place)), ivec2(0), u_size - 1);
  uvec4 t = texelFetch(u_cells, cell, 0);
  int state = int(t.r & 15u);
  int flags = int(t.g);
  vec2 f = v_place - vec2(cell);
  vec2 p = f * u_cellPx;
  vec2 q = (1.0 - f) * u_cellPx;
  vec2 h = vec2(gl_FragCoord.x - u_anchor.x, u_anchor.y - gl_FragCoord.y) / u_ratio;
  vec4 c = cellLook(state, flags, h, p, q);
#ifdef CHANGE
  vec4 front = u_front[int(t.a & 3u)];
  float ahead = distance(v_place * u_cellPx, front.xy * u_cellPx) - front.z * min(u_cellPx.x, u_cellPx.y);
  float old = clamp(ahead / 5.0 + 0.5, 0.0, 1.0) * front.w;
  c = mix(c, cellLook(int(t.r >> 4), int(t.a >> 2), h, p, q), old);
#endif
  int edges = int(t.b);
  bool upper = p.y < q.y;
  bool leftward = p.x < q.x;
  float level = stepEdge((upper ? edges : edges >> 4) & 3, min(p.y, q.y), p.x, u_cellPx.x);
  float upright = stepEdge((leftward ? edges >> 6 : edges >> 2) & 3, min(p.x, q.x), p.y, u_cellPx.y);
  lay(c, bare(state) ? u_sheetInk : u_ink, max(level, upright));
#ifdef REGIONS
  float preview = (flags & ${HIGHLIGHT_BIT}) != 0 ? regionEdge(cell, ${HIGHLIGHT_BIT}, p, q) : 1e6;
  lay(c, vec3(1.0), cover(preview, ${number(OUTLINE.preview + 1.2)}));
  lay(c, u_preview, cover(preview, ${number(OUTLINE.preview)}));
  float chosen = (flags & ${SELECTED_BIT}) != 0 ? regionEdge(cell, ${SELECTED_BIT}, p, q) : 1e6;
  lay(c, vec3(1.0), cover(chosen, ${number(OUTLINE.chosen + OUTLINE.casing)}));
  lay(c, u_ink, cover(chosen, ${number(OUTLINE.chosen)}));
#endif
  result = c;
}`
