import { FLAKE_ROWS } from '#shared/picture/engine/sample-light'
import { GAP_LIGHT } from '#shared/picture/paint-light'
import { BANDS_SOURCE } from './bands-source'
import { GLOW_SOURCE } from './glow-source'
import { glsl } from './glsl-number'
import { TONE_SOURCE } from './tone-source'

/** Coats one picture may have on the graphics processor; a scheme has fewer. */
export const COATS_MOST = 128
/** Where the parts of a coat's row begin, in texels of four bands. */
export const FILM_COLUMNS = { R: 0, Q: 4, through: 8, T: 12, width: 16 } as const
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

/**
 * The light of one sample: its whole stack from the ground up, its flakes from the top down, what it gives off, finish and tone.
 *
 * @param glows whether a coat of the stack glows; without, the program is spared the room that takes
 */
export const fragmentSource = (glows: boolean) => /* glsl */ `#version 300 es
precision highp float;
precision highp int;
precision highp sampler2D;
precision highp sampler2DArray;
precision highp usampler2DArray;

uniform usampler2DArray codes;          // a layer for each coat: how much lies at each sample
uniform sampler2DArray films;           // a layer for each coat, a row for each level: R, T² - R², what a ray keeps, T
uniform sampler2DArray flakes;          // a layer for each coat of flakes, a row for each level
uniform sampler2DArray mirrorings;      // a layer for each kind of flakes: how strongly they mirror, and place between two rows
uniform sampler2D lights;               // light on the paint, white added evenly, gloss; 1 in the gap of a joint

// Layers of codes and film in two halves; level up to which nothing is seen; layers of flakes and their mirroring in two halves,
// or -1; layer of the glow, or -1.
layout(std140) uniform Stack { ivec4 coats[${COATS_MOST}]; };
uniform int coatCount;
uniform int lowestFlakes, lowestGlow;   // lowest coat of flakes, and lowest that glows, or the count of coats

uniform mat4 ground;
uniform mat4 red, green, blue;          // linear sRGB of a radiance factor
uniform vec2 surface;                   // light the surface loses outside, and sends back inside
uniform vec3 white;                     // linear sRGB of a perfect white
uniform bool isPlain, isGlossy;

out vec4 shown;

${BANDS_SOURCE}
${TONE_SOURCE}

const int FILM_R = ${FILM_COLUMNS.R}, FILM_Q = ${FILM_COLUMNS.Q}, FILM_THROUGH = ${FILM_COLUMNS.through}, FILM_T = ${FILM_COLUMNS.T};

int filmOf(ivec4 coat) { return coat.x >> 16; }

int levelAt(ivec2 at, ivec4 coat) {
  return int(texelFetch(codes, ivec3(at, coat.x & 0xffff), 0).r);
}

// Reflectance of the stack inside the film, as a fraction until the end.
mat4 stackReflectance(ivec2 at) {
  mat4 N = ground, D = evenBands(1.0);
  int laid = 0;
  for (int c = 0; c < coatCount; c++) {
    ivec4 coat = coats[c];
    int level = levelAt(at, coat);
    if (level <= coat.y) continue;
    mat4 R = bandsAt(films, FILM_R, level, filmOf(coat));
    mat4 under = N;
    N = matrixCompMult(R, D) + matrixCompMult(bandsAt(films, FILM_Q, level, filmOf(coat)), under);
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
    if (level <= coat.y) continue;
    if (coat.z >= 0) {
      int layer = coat.z & 0xffff;
      vec2 mirroring = texelFetch(mirrorings, ivec3(at, coat.z >> 16), 0).xy;
      int near = int(mirroring.y);
      float share = mirroring.y - float(near);
      int column = ${FLAKE_COLUMNS.mirrored} + 4 * near;
      mat4 mirrored = bandsAt(flakes, column, level, layer) * (1.0 - share) + bandsAt(flakes, column + 4, level, layer) * share;
      mat4 moved = mirroring.x * mirrored - light * bandsAt(flakes, ${FLAKE_COLUMNS.diffuse}, level, layer);
      sum += linearOf(matrixCompMult(reaching, moved));
    }
    if (c > lowestFlakes) reaching = matrixCompMult(reaching, bandsAt(films, FILM_THROUGH, level, filmOf(coat)));
  }
  return sum;
}

${glows ? GLOW_SOURCE : ''}

void main() {
  ivec2 at = ivec2(gl_FragCoord.xy);
  vec4 here = texelFetch(lights, at, 0);
  mat4 R = stackReflectance(at);
  vec3 paint = here.x * (1.0 - surface.x) * (1.0 - surface.y) * linearOf(R / (evenBands(1.0) - surface.y * R));
  paint += flakeLight(at, here.x);
  ${glows ? 'paint += here.x * glowLight(at);' : ''}
  paint += here.y * white;
  paint = isPlain ? tonedPlain(paint) : tonedPaint(paint);
  if (isGlossy) paint = withGloss(paint, here.z * white);
  shown = vec4(here.w > 0.0 ? paint * ${glsl(GAP_LIGHT)} : paint, 1.0);
}
`
