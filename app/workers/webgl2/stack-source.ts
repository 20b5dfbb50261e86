import { FLAKE_TABLE_COSINES } from '#shared/optics/flake-table'
import { GLINT_LEAST } from '#shared/picture/flake-light'
import { FORM, GAP_LIGHT } from '#shared/picture/paint-light'
import { BANDS_SOURCE } from './bands-source'
import { glsl } from './glsl-number'
import { TENT_SOURCE } from './tent-source'
import { TONE_SOURCE } from './tone-source'

/** Coats one picture may have on the graphics processor; a scheme has fewer. */
export const COATS_MOST = 128
/** Where the parts of a coat's row begin, in texels of four bands. */
export const FILM_COLUMNS = { R: 0, Q: 4, through: 8, width: 12 } as const
/** The same for its flakes: what they sent to all sides, then what they mirror at one cosine after the other. */
export const FLAKE_COLUMNS = { diffuse: 0, mirrored: 4, width: 4 + 4 * FLAKE_TABLE_COSINES.length } as const

/** Coats laid before the fraction is brought back to a denominator of 1, so that no number becomes too small for 32 bits. */
const LAID_AT_ONCE = 4
const ROWS = FLAKE_TABLE_COSINES.length
const LOWEST_COSINE = FLAKE_TABLE_COSINES.at(-1)!

/** One triangle over everything. */
export const VERTEX_SOURCE = /* glsl */ `#version 300 es
void main() {
  gl_Position = vec4(gl_VertexID == 1 ? 3.0 : -1.0, gl_VertexID == 2 ? 3.0 : -1.0, 0.0, 1.0);
}
`

/** The light of one sample: its whole stack from the ground up, its flakes from the top down, finish and tone. */
export const FRAGMENT_SOURCE = /* glsl */ `#version 300 es
precision highp float;
precision highp int;
precision highp sampler2D;
precision highp sampler2DArray;
precision highp usampler2DArray;

uniform usampler2DArray codes;          // a layer for each coat: how much lies at each sample
uniform sampler2DArray films;           // a layer for each coat, a row for each level: R, T² - R², what a ray keeps
uniform sampler2DArray flakes;          // a layer for each coat of flakes, a row for each level
uniform sampler2D directions;           // normal x, y, occlusion, sparkle
uniform sampler2D glosses;              // normal of the gloss, share of the gloss; below zero in the gap of a joint
uniform sampler2D glow;                 // linear light given off where irradiance is 1
uniform sampler2DArray lobes;           // by normal: irradiance, matt light, strength and cosine of a spread of flakes

// place: layer of the codes, layer of the film, level up to which nothing is seen, layer of the flakes or -1
// flake: layer of the lobe or -1, sparkle; gain and cosine where there is no lobe
struct Coat { ivec4 place; vec4 flake; };
layout(std140) uniform Stack { Coat coats[${COATS_MOST}]; };
uniform int coatCount;
uniform int lowestFlakes;               // lowest coat of flakes, or the count of coats

uniform mat4 ground;
uniform mat4 red, green, blue;          // linear sRGB of a radiance factor
uniform vec2 surface;                   // light its surface loses outside, and sends back inside
uniform bool isPlain, isGlossy, hasGlow;
uniform int irradianceLayer, mattLayer; // -1 without matt light
uniform float mattShare;
uniform float veil;                     // light added everywhere

out vec4 shown;

${BANDS_SOURCE}
${TENT_SOURCE}
${TONE_SOURCE}

vec2 lobeAt(int layer, vec2 normal) {
  int size = textureSize(lobes, 0).x;
  vec2 place = (clamp(normal, -1.0, 1.0) + 1.0) * (float(size - 1) / 2.0);
  ivec2 cell = min(ivec2(place), ivec2(size - 2));
  vec2 share = place - vec2(cell);
  vec2 below = mix(texelFetch(lobes, ivec3(cell, layer), 0).xy, texelFetch(lobes, ivec3(cell + ivec2(1, 0), layer), 0).xy, share.x);
  vec2 above = mix(texelFetch(lobes, ivec3(cell + ivec2(0, 1), layer), 0).xy, texelFetch(lobes, ivec3(cell + ivec2(1, 1), layer), 0).xy, share.x);
  return mix(below, above, share.y);
}

// Reflectance of the stack inside the film, as a fraction until the end.
mat4 stackReflectance(ivec2 at) {
  mat4 N = ground, D = evenBands(1.0);
  int laid = 0;
  for (int c = 0; c < coatCount; c++) {
    ivec4 place = coats[c].place;
    int level = int(texelFetch(codes, ivec3(at, place.x), 0).r);
    if (level <= place.z) continue;
    mat4 R = bandsAt(films, ${FILM_COLUMNS.R}, level, place.y);
    mat4 under = N;
    N = matrixCompMult(R, D) + matrixCompMult(bandsAt(films, ${FILM_COLUMNS.Q}, level, place.y), under);
    D -= matrixCompMult(R, under);
    if (++laid % ${LAID_AT_ONCE} == 0) {
      N /= D;
      D = evenBands(1.0);
    }
  }
  return N / D;
}

// Light that flakes mirror to the eye, less what they sent to all sides.
vec3 flakeLight(ivec2 at, vec4 here, float light) {
  vec3 sum = vec3(0.0);
  mat4 reaching = evenBands(1.0);
  for (int c = coatCount - 1; c >= lowestFlakes; c--) {
    ivec4 place = coats[c].place;
    int level = int(texelFetch(codes, ivec3(at, place.x), 0).r);
    if (level <= place.z) continue;
    if (place.w >= 0) {
      vec4 flake = coats[c].flake;
      vec2 lobe = flake.zw;
      if (flake.x >= 0.0) {
        lobe = lobeAt(int(flake.x), here.xy);
        lobe.x *= max(${glsl(GLINT_LEAST)}, 1.0 + flake.y * here.w) * here.z;
      }
      float row = clamp((1.0 - lobe.y) * ${glsl((ROWS - 1) / (1 - LOWEST_COSINE))}, 0.0, ${glsl(ROWS - 1)});
      int near = min(${ROWS - 2}, int(row));
      float share = row - float(near);
      int column = ${FLAKE_COLUMNS.mirrored} + 4 * near;
      mat4 mirrored = bandsAt(flakes, column, level, place.w) * (1.0 - share) + bandsAt(flakes, column + 4, level, place.w) * share;
      mat4 moved = lobe.x * mirrored - light * bandsAt(flakes, ${FLAKE_COLUMNS.diffuse}, level, place.w);
      sum += linearOf(matrixCompMult(reaching, moved));
    }
    if (c > lowestFlakes) reaching = matrixCompMult(reaching, bandsAt(films, ${FILM_COLUMNS.through}, level, place.y));
  }
  return sum;
}

void main() {
  ivec2 at = ivec2(gl_FragCoord.xy);
  vec4 here = texelFetch(directions, at, 0);
  vec4 gloss = texelFetch(glosses, at, 0);
  float light = isPlain ? 1.0 : (1.0 + ${glsl(FORM)} * (lobeAt(irradianceLayer, here.xy).x - 1.0)) * here.z;

  mat4 R = stackReflectance(at);
  vec3 paint = light * (1.0 - surface.x) * (1.0 - surface.y) * linearOf(R / (evenBands(1.0) - surface.y * R)) + veil;
  if (hasGlow) paint += light * texelFetch(glow, at, 0).rgb;
  paint += flakeLight(at, here, light);
  if (mattLayer >= 0) paint += mattShare * lobeAt(mattLayer, here.xy).x * here.z;

  paint = isPlain ? tonedPlain(paint) : tonedPaint(paint);
  if (isGlossy) paint = withGloss(paint, abs(gloss.w) * glossLight(gloss.xyz));
  if (gloss.w < 0.0) paint *= ${glsl(GAP_LIGHT)};
  shown = vec4(paint, 1.0);
}
`
