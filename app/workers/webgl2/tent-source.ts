import { HOLE } from '#shared/picture/light-rig'
import { FILM_INDEX } from '#shared/picture/surface-lobes'
import { glsl } from './glsl-number'

/** Lit strips a tent may have. */
export const STRIPS_MOST = 8

const radians = (degrees: number) => degrees * Math.PI / 180

/** GLSL: the mirrored tent, as `light-rig.ts` has it, and the share of it that a clear mirrors. */
export const TENT_SOURCE = /* glsl */ `
uniform vec4 cloth;                     // overhead, horizon, floor, what the hole leaves
uniform int stripCount;
uniform vec4 stripPlaces[${STRIPS_MOST}];    // elevation, azimuth, half height, half width, degrees
uniform vec2 stripLights[${STRIPS_MOST}];    // edge in degrees, radiance
uniform float tentGain;

const float DEGREE = ${glsl(Math.PI / 180)};

float smoothly(float from, float to, float x) {
  float t = clamp((x - from) / (to - from), 0.0, 1.0);
  return t * t * (3.0 - 2.0 * t);
}

float clothRadiance(vec3 toward) {
  float up = 1.0 - abs(toward.y);
  float radiance = cloth.y + ((toward.y >= 0.0 ? cloth.x : cloth.z) - cloth.y) * (1.0 - up * up);
  float toHole = toward.y * ${glsl(Math.sin(radians(HOLE.elevation)))} + toward.z * ${glsl(Math.cos(radians(HOLE.elevation)))};
  if (toHole < 0.9) return radiance;
  float off = acos(min(1.0, toHole)) / DEGREE;
  return radiance * (cloth.w + (1.0 - cloth.w) * smoothly(${glsl(HOLE.radius - HOLE.edge)}, ${glsl(HOLE.radius + HOLE.edge)}, off));
}

float stripShare(vec4 place, float edge, float elevation, float azimuth) {
  float up = abs(elevation - place.x);
  if (up > 180.0) up = 360.0 - up;
  float along = abs(azimuth - place.y);
  if (up >= place.z + edge || along >= place.w + edge) return 0.0;
  return (1.0 - smoothly(place.z - edge, place.z + edge, up)) * (1.0 - smoothly(place.w - edge, place.w + edge, along));
}

float tentRadiance(vec3 toward) {
  float elevation = atan(toward.y, toward.z) / DEGREE;
  float azimuth = asin(clamp(toward.x, -1.0, 1.0)) / DEGREE;
  float light = clothRadiance(toward);
  for (int s = 0; s < stripCount; s++) light += stripLights[s].y * stripShare(stripPlaces[s], stripLights[s].x, elevation, azimuth);
  return light;
}

float fresnel(float cosine) {
  float inside = sqrt(1.0 - (1.0 - cosine * cosine) / ${glsl(FILM_INDEX * FILM_INDEX)});
  float s = (cosine - ${glsl(FILM_INDEX)} * inside) / (cosine + ${glsl(FILM_INDEX)} * inside);
  float p = (${glsl(FILM_INDEX)} * cosine - inside) / (${glsl(FILM_INDEX)} * cosine + inside);
  return (s * s + p * p) / 2.0;
}

float glossLight(vec3 normal) {
  float facing = max(0.02, normal.z);
  return fresnel(facing) * tentGain * tentRadiance(vec3(2.0 * facing * normal.xy, 2.0 * facing * facing - 1.0));
}
`
