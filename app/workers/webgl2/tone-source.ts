import { CHROMA_STEPS, KNEE, SOFTNESS, WHITE_AT } from '#shared/picture/tone'
import { glsl } from './glsl-number'

/** GLSL: what `tone.ts` does to the light of one sample. */
export const TONE_SOURCE = /* glsl */ `
float least(vec3 rgb) { return min(rgb.r, min(rgb.g, rgb.b)); }
float most(vec3 rgb) { return max(rgb.r, max(rgb.g, rgb.b)); }

vec3 cubeRoot(vec3 value) {
  vec3 root = sign(value) * pow(abs(value), vec3(1.0 / 3.0));
  // A power of the hardware's may be rough; one step of Newton's makes it as fine as a number can be.
  vec3 square = max(root * root, vec3(1e-20));
  return root - (root * square - value) / (3.0 * square);
}

// B. Ottosson, "A perceptual color space for image processing" (2020).
vec3 oklabOf(vec3 rgb) {
  vec3 lms = cubeRoot(vec3(
    0.4122214708 * rgb.r + 0.5363325363 * rgb.g + 0.0514459929 * rgb.b,
    0.2119034982 * rgb.r + 0.6806995451 * rgb.g + 0.1073969566 * rgb.b,
    0.0883024619 * rgb.r + 0.2817188376 * rgb.g + 0.6299787005 * rgb.b
  ));
  return vec3(
    0.2104542553 * lms.x + 0.7936177850 * lms.y - 0.0040720468 * lms.z,
    1.9779984951 * lms.x - 2.4285922050 * lms.y + 0.4505937099 * lms.z,
    0.0259040371 * lms.x + 0.7827717662 * lms.y - 0.8086757660 * lms.z
  );
}

vec3 linearOfOklab(vec3 lab) {
  vec3 lms = vec3(
    lab.x + 0.3963377774 * lab.y + 0.2158037573 * lab.z,
    lab.x - 0.1055613458 * lab.y - 0.0638541728 * lab.z,
    lab.x - 0.0894841775 * lab.y - 1.2914855480 * lab.z
  );
  lms = lms * lms * lms;
  return vec3(
    4.0767416621 * lms.x - 3.3077115913 * lms.y + 0.2309699292 * lms.z,
    -1.2684380046 * lms.x + 2.6097574011 * lms.y - 0.3413193965 * lms.z,
    -0.0041960863 * lms.x - 0.7034186147 * lms.y + 1.7076147010 * lms.z
  );
}

vec3 lessChroma(vec3 rgb) {
  vec3 lab = oklabOf(rgb);
  float low = 0.0, high = 1.0;
  for (int i = 0; i < ${CHROMA_STEPS}; i++) {
    float share = (low + high) / 2.0;
    if (least(linearOfOklab(vec3(lab.x, lab.yz * share))) >= 0.0) low = share;
    else high = share;
  }
  return max(vec3(0.0), linearOfOklab(vec3(lab.x, lab.yz * low)));
}

float shoulder(float value, float knee) {
  float room = 1.0 - knee;
  return knee + room * (1.0 - exp(-(value - knee) / (room * ${glsl(SOFTNESS)})));
}

vec3 tonedPaint(vec3 rgb) {
  vec3 shown = least(rgb) < 0.0 ? lessChroma(rgb) : rgb;
  float peak = most(shown);
  return peak <= ${glsl(KNEE)} ? shown : shown * (shoulder(peak, ${glsl(KNEE)}) / peak);
}

vec3 tonedPlain(vec3 rgb) {
  vec3 shown = least(rgb) < 0.0 ? lessChroma(rgb) : rgb;
  return shown / max(1.0, most(shown));
}

vec3 withGloss(vec3 rgb, vec3 gloss) {
  float before = most(rgb);
  vec3 sum = rgb + gloss;
  float peak = most(sum);
  float knee = max(${glsl(KNEE)}, min(0.97, before));
  if (peak <= knee) return sum;
  float shown = shoulder(peak, knee);
  float whitened = peak > 1.0 ? min(1.0, pow((peak - 1.0) / ${glsl(WHITE_AT)}, 0.8)) : 0.0;
  vec3 scaled = sum * (shown / peak);
  return scaled + (shown - scaled) * whitened;
}
`
