/** Coats that glow which may lie in one place on the graphics processor. */
export const GLOWING_MOST = 8
/** Where the parts of a glowing coat's row begin, in texels of four bands. */
export const GLOW_COLUMNS = { takes: 0, back: 4, onward: 8, width: 12 } as const

/** Light so weak that dividing by it would say nothing. */
const NONE = 1e-12

/**
 * GLSL: what coats give off at one sample, as `glow-light.ts` works it out. There light is dimmed by a ratio of the whole
 * stack's denominators; here, in 32 bits, coat by coat by T/(1 - RG).
 */
export const GLOW_SOURCE = /* glsl */ `
uniform sampler2DArray glows;                       // a layer for each coat that glows, a row for each level: takes, back, onward
uniform mat4 photons;                               // falling, per 10 nm
uniform mat4 widths;                                // exact bands that each band stands for
uniform mat4 givenRed, givenGreen, givenBlue;       // linear sRGB of a photon per 10 nm that leaves

// A coat that glows, where it lies.
struct Glowing {
  int level, film, glow;
  mat4 returns;                                     // of a photon that leaves it downwards, how many come back from below
  mat4 gain;                                        // of a photon at the top of the film, what comes to it; and back
  float onwardAgain, backAgain;                     // photons it takes again of one given off onward or backward
  float above, below;                               // photons it takes of light from either side
};
Glowing lit[${GLOWING_MOST}];

mat4 perBand(mat4 dimmed) {
  return mat4(
    mix(vec4(0.0), 1.0 / dimmed[0], greaterThan(dimmed[0], vec4(${NONE}))),
    mix(vec4(0.0), 1.0 / dimmed[1], greaterThan(dimmed[1], vec4(${NONE}))),
    mix(vec4(0.0), 1.0 / dimmed[2], greaterThan(dimmed[2], vec4(${NONE}))),
    mix(vec4(0.0), 1.0 / dimmed[3], greaterThan(dimmed[3], vec4(${NONE})))
  );
}

mat4 filmT(Glowing here) { return bandsAt(films, FILM_T, here.level, here.film); }
mat4 glowPart(Glowing here, int column) { return bandsAt(glows, column, here.level, here.glow); }

// Finds the coats that glow here, from the ground up; returns how many, and the reflectance of the whole stack.
int findGlowing(ivec2 at, out mat4 whole) {
  int count = 0;
  whole = ground;
  for (int c = 0; c < coatCount; c++) {
    ivec4 coat = coats[c];
    int level = levelAt(at, coat);
    if (level <= coat.y) continue;
    int film = filmOf(coat);
    mat4 R = bandsAt(films, FILM_R, level, film);
    mat4 passing = evenBands(1.0) - matrixCompMult(R, whole);
    if (count > 0) {
      mat4 dimming = bandsAt(films, FILM_T, level, film) / passing;
      for (int g = 0; g < count; g++) lit[g].gain = matrixCompMult(lit[g].gain, dimming);
    }
    if (coat.w >= 0) {
      lit[count].level = level;
      lit[count].film = film;
      lit[count].glow = coat.w;
      lit[count].returns = whole / passing;
      lit[count].gain = evenBands(1.0);
      mat4 again = matrixCompMult(lit[count].returns, glowPart(lit[count], ${GLOW_COLUMNS.takes}));
      lit[count].onwardAgain = total(again, glowPart(lit[count], ${GLOW_COLUMNS.onward}));
      lit[count].backAgain = total(again, glowPart(lit[count], ${GLOW_COLUMNS.back}));
      count++;
    }
    whole = (R + matrixCompMult(bandsAt(films, FILM_Q, level, film), whole)) / passing;
  }
  return count;
}

// Photons that rise to the top of the film when some enter it: from the top down, then from the ground up.
mat4 risenOf(mat4 entering, int count) {
  mat4 sinking = entering;
  for (int g = count - 1; g >= 0; g--) {
    mat4 T = filmT(lit[g]);
    mat4 taken = matrixCompMult(matrixCompMult(sinking, lit[g].gain), glowPart(lit[g], ${GLOW_COLUMNS.takes}));
    float above = total(evenBands(1.0), taken);
    float below = (total(matrixCompMult(T, lit[g].returns), taken) + above * lit[g].onwardAgain) / (1.0 - lit[g].backAgain);
    lit[g].above = above;
    lit[g].below = below;
    if (g > 0) {
      mat4 given = above * glowPart(lit[g], ${GLOW_COLUMNS.onward}) + below * glowPart(lit[g], ${GLOW_COLUMNS.back});
      sinking += matrixCompMult(given, perBand(matrixCompMult(lit[g].gain, T)));
    }
  }
  mat4 risen = evenBands(0.0);
  for (int g = 0; g < count; g++) {
    mat4 T = filmT(lit[g]);
    float above = lit[g].above, below = lit[g].below;
    if (g > 0) {
      mat4 fed = matrixCompMult(risen, perBand(matrixCompMult(lit[g].gain, T)));
      below += total(fed, glowPart(lit[g], ${GLOW_COLUMNS.takes})) / (1.0 - lit[g].backAgain);
    }
    mat4 near = glowPart(lit[g], ${GLOW_COLUMNS.back}), far = glowPart(lit[g], ${GLOW_COLUMNS.onward});
    mat4 returned = matrixCompMult(T, lit[g].returns);
    risen += matrixCompMult(above * near + below * far + matrixCompMult(above * far + below * near, returned), lit[g].gain);
  }
  return risen;
}

vec3 glowLight(ivec2 at) {
  bool isAny = false;
  for (int c = lowestGlow; c < coatCount; c++) isAny = isAny || coats[c].w >= 0 && levelAt(at, coats[c]) > coats[c].y;
  if (!isAny) return vec3(0.0);
  mat4 whole;
  int count = findGlowing(at, whole);
  mat4 crossing = evenBands(1.0) - surface.y * whole;
  mat4 risen = risenOf((1.0 - surface.x) * photons / crossing, count);
  mat4 again = risenOf(surface.y * risen / crossing, count);
  // What rises again and again after the surface sent it back goes in a falling row.
  float first = total(widths, risen), second = total(widths, again);
  float row = first > second ? first / (first - second) : 1.0;
  mat4 leaving = (1.0 - surface.y) * (risen + row * again) / crossing;
  return vec3(total(givenRed, leaving), total(givenGreen, leaving), total(givenBlue, leaving));
}
`
