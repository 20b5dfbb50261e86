import { FORM } from '#shared/picture/paint-light'
import { SHEET_COSINES } from '#shared/picture/turn/flake-groups'
import { TONE_SOURCE } from '~/workers/webgl2/tone-source'
import { glsl } from '~/workers/webgl2/glsl-number'
import { TENT_SOURCE } from './tent-source'

/** GLSL: turns corners and normals of every part to the viewer, without perspective, as the side view sees them. */
export const PART_VERTEX = /* glsl */ `
precision highp float;
uniform mat3 turn;
uniform vec3 pivot;
uniform vec3 perMm;
uniform vec2 nudge;
in vec3 position;
in vec3 normal;
in vec2 uv;
in float kept;
in float own;
out vec3 vNormal;
out vec2 vUv;
out float vKept;
out float vOwn;
void main() {
  vec3 seen = turn * (position - pivot);
  gl_Position = vec4(seen.xy * perMm.xy + nudge, -seen.z * perMm.z, 1.0);
  vNormal = turn * normal;
  vUv = uv;
  vKept = kept;
  vOwn = own;
}
`

const HEAD = /* glsl */ `
precision highp float;
precision highp sampler2D;
uniform mat3 turn;
uniform sampler2D lightFirst;
uniform sampler2D lightSecond;
uniform float lightSide;
uniform vec3 white;
in vec3 vNormal;
in vec2 vUv;
in float vKept;
in float vOwn;
out vec4 shown;
${TONE_SOURCE}
${TENT_SOURCE}
// Where the light's tables are read for a normal of the view.
vec2 tablePlace(vec3 n) {
  vec2 at = n.z < 0.0 ? normalize(n.xy) : n.xy;
  return ((at * 0.5 + 0.5) * (lightSide - 1.0) + 0.5) / lightSide;
}
`

/** GLSL: painted skin and fins, lit as `paintLight` lights a sample. */
export const PAINT_FRAGMENT = /* glsl */ `
${HEAD}
uniform sampler2D formPaint;
uniform sampler2D formGloss;
uniform sampler2D base;
uniform sampler2D near0;
uniform sampler2D between0;
uniform sampler2D far0;
uniform sampler2D near1;
uniform sampler2D between1;
uniform sampler2D far1;
uniform int groups;
uniform float mattShare;
uniform float glossy;

// A parabola through the three rows a sheet keeps.
vec3 rowAt(vec3 near, vec3 between, vec3 far, float cosine) {
  float x = clamp((1.0 - cosine) / ${glsl(1 - SHEET_COSINES[2])}, 0.0, 1.0);
  return near * ((1.0 - x) * (1.0 - 2.0 * x)) + between * (4.0 * x * (1.0 - x)) + far * (x * (2.0 * x - 1.0));
}

void main() {
  vec4 form = texture(formPaint, vUv);
  vec4 gloss = texture(formGloss, vUv);
  vec3 own = normalize(vNormal);
  vec3 n = normalize(mix(turn * form.xyz, own, vOwn));
  vec3 g = normalize(mix(turn * gloss.xyz, own, vOwn));
  vec4 first = texture(lightFirst, tablePlace(n));
  vec3 light = texture(base, vUv).rgb * ((1.0 + ${glsl(FORM)} * (first.x - 1.0)) * form.a);
  if (groups > 0) {
    light += first.z * form.a * rowAt(texture(near0, vUv).rgb, texture(between0, vUv).rgb, texture(far0, vUv).rgb, first.w);
  }
  if (groups > 1) {
    vec4 second = texture(lightSecond, tablePlace(n));
    light += second.x * form.a * rowAt(texture(near1, vUv).rgb, texture(between1, vUv).rgb, texture(far1, vUv).rgb, second.y);
  }
  light += white * (mattShare * (1.0 - glossy) * first.y * form.a);
  vec3 toned = tonedPaint(light);
  // Inner faces are dark and dull.
  if (glossy > 0.5 && vKept > 0.99) toned = withGloss(toned, white * (gloss.a * glossLight(g)));
  shown = vec4(toned * vKept, 1.0);
}
`

/** Foil behind a dome sees half of the tent's form; its polish outshines the clear. As the side view draws eyes. */
const EYE = { form: 0.5, shine: 1.25 }

/** GLSL: a fitted eye. */
export const EYE_FRAGMENT = /* glsl */ `
${HEAD}
uniform sampler2D eye;
void main() {
  vec3 n = normalize(vNormal);
  float light = 1.0 + ${glsl(EYE.form)} * (texture(lightFirst, tablePlace(n)).x - 1.0);
  vec3 toned = tonedPaint(texture(eye, vUv).rgb * light);
  shown = vec4(white * withGloss(toned, vec3(${glsl(EYE.shine)} * glossLight(n))), 1.0);
}
`

/** Bright wire and the one highlight it carries, as the side view draws it. */
const STEEL = { dark: 0.045, body: 0.36, shine: 0.51, at: 0.42, narrow: 0.055 }

/** GLSL: rings and pins. */
export const WIRE_FRAGMENT = /* glsl */ `
${HEAD}
void main() {
  vec3 n = normalize(vNormal);
  float facing = max(0.0, n.z);
  float off = n.y - ${glsl(STEEL.at)};
  float light = ${glsl(STEEL.dark)} + ${glsl(STEEL.body)} * facing * (0.55 + 0.45 * n.y)
    + ${glsl(STEEL.shine)} * facing * exp(-off * off / ${glsl(STEEL.narrow)});
  shown = vec4(white * (light * (0.35 + 0.65 * facing)), 1.0);
}
`

/** A clear plate darkens what lies behind it; its cut edges collect light, and it mirrors the tent. */
const PLATE = { behind: 0.75, haze: 0.07, edge: 0.5, sheen: 0.16, mirrors: 0.3 }

/** GLSL: the lip. `uv` holds the mm to the nearest edge, and 1 on the cut. */
export const LIP_FRAGMENT = /* glsl */ `
${HEAD}
uniform float edgeMm;
void main() {
  vec3 n = normalize(vNormal);
  float flatness = abs(n.z);
  float off = vUv.x / max(edgeMm * (0.4 + 0.5 * flatness), 1e-3);
  float rim = exp(-off * off);
  float sheen = ${glsl(PLATE.sheen)} * flatness * (0.6 + 0.4 * abs(n.y)) * (1.0 - vUv.y);
  float light = ${glsl(PLATE.haze)} + sheen + ${glsl(PLATE.edge)} * rim + ${glsl(PLATE.mirrors)} * min(1.5, glossLight(n));
  shown = vec4(white * min(1.0, light), ${glsl(1 - PLATE.behind)} + 0.5 * rim);
}
`
