import { FLAKE_ROWS } from '#shared/picture/engine/sample-light'
import { GAP_LIGHT } from '#shared/picture/paint-light'
import { BANDS_SOURCE } from './bands-source'
import { glsl } from './glsl-number'
import { TONE_SOURCE } from './tone-source'

/** Coats one picture may have on the graphics processor; a scheme has fewer. */
export const COATS_MOST = 128
/** Where the parts of a coat's row begin, in texels of four bands. */
export const FILM_COLUMNS = { R: 0, Q: 4, through: 8, width: 12 } as const
/** The same for its flakes: what they sent to all sides, then what they mirror at one cosine after the other. */
export const FLAKE_COLUMNS = { diffuse: 0, mirrored: 4, width: 4 + 4 * FLAKE_ROWS } as const

/** Coats laid before the fraction is brought back to a denominator of 1, so that no number becomes too small for 32 bits. */
const LAID_AT_ONCE = 4

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
uniform sampler2DArray mirrorings;      // a layer for each kind of flakes: how strongly they mirror, and place between two rows
uniform sampler2D lights;               // light on the paint, white added evenly, gloss; 1 in the gap of a joint
uniform sampler2D glow;                 // linear light given off where the light on the paint is 1

// Layer of the codes, layer of the film, level up to which nothing is seen; layers of flakes and their mirroring in two halves, or -1.
layout(std140) uniform Stack { ivec4 coats[${COATS_MOST}]; };
uniform int coatCount;
uniform int lowestFlakes;               // lowest coat of flakes, or the count of coats

uniform mat4 ground;
uniform mat4 red, green, blue;          // linear sRGB of a radiance factor
uniform vec2 surface;                   // light the surface loses outside, and sends back inside
uniform vec3 white;                     // linear sRGB of a perfect white
uniform bool isPlain, isGlossy, hasGlow;

out vec4 shown;

${BANDS_SOURCE}
${TONE_SOURCE}

int levelAt(ivec2 at, ivec4 coat) {
  return int(texelFetch(codes, ivec3(at, coat.x), 0).r);
}

// Reflectance of the stack inside the film, as a fraction until the end.
mat4 stackReflectance(ivec2 at) {
  mat4 N = ground, D = evenBands(1.0);
  int laid = 0;
  for (int c = 0; c < coatCount; c++) {
    ivec4 coat = coats[c];
    int level = levelAt(at, coat);
    if (level <= coat.z) continue;
    mat4 R = bandsAt(films, ${FILM_COLUMNS.R}, level, coat.y);
    mat4 under = N;
    N = matrixCompMult(R, D) + matrixCompMult(bandsAt(films, ${FILM_COLUMNS.Q}, level, coat.y), under);
    D -= matrixCompMult(R, under);
    if (++laid % ${LAID_AT_ONCE} == 0) {
      N /= D;
      D = evenBands(1.0);
    }
  }
  return N / D;
}

// Light that flakes mirror to the eye, less what they sent to all sides.
vec3 flakeLight(ivec2 at, float light) {
  vec3 sum = vec3(0.0);
  mat4 reaching = evenBands(1.0);
  for (int c = coatCount - 1; c >= lowestFlakes; c--) {
    ivec4 coat = coats[c];
    int level = levelAt(at, coat);
    if (level <= coat.z) continue;
    if (coat.w >= 0) {
      int layer = coat.w & 0xffff;
      vec2 mirroring = texelFetch(mirrorings, ivec3(at, coat.w >> 16), 0).xy;
      int near = int(mirroring.y);
      float share = mirroring.y - float(near);
      int column = ${FLAKE_COLUMNS.mirrored} + 4 * near;
      mat4 mirrored = bandsAt(flakes, column, level, layer) * (1.0 - share) + bandsAt(flakes, column + 4, level, layer) * share;
      mat4 moved = mirroring.x * mirrored - light * bandsAt(flakes, ${FLAKE_COLUMNS.diffuse}, level, layer);
      sum += linearOf(matrixCompMult(reaching, moved));
    }
    if (c > lowestFlakes) reaching = matrixCompMult(reaching, bandsAt(films, ${FILM_COLUMNS.through}, level, coat.y));
  }
  return sum;
}

void main() {
  ivec2 at = ivec2(gl_FragCoord.xy);
  vec4 here = texelFetch(lights, at, 0);
  mat4 R = stackReflectance(at);
  vec3 paint = here.x * (1.0 - surface.x) * (1.0 - surface.y) * linearOf(R / (evenBands(1.0) - surface.y * R));
  paint += flakeLight(at, here.x);
  if (hasGlow) paint += here.x * texelFetch(glow, at, 0).rgb;
  paint += here.y * white;
  paint = isPlain ? tonedPlain(paint) : tonedPaint(paint);
  if (isGlossy) paint = withGloss(paint, here.z * white);
  shown = vec4(here.w > 0.0 ? paint * ${glsl(GAP_LIGHT)} : paint, 1.0);
}
`
