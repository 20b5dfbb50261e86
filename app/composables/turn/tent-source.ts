import { HOLE } from '#shared/picture/light-rig'
import { FILM_INDEX } from '#shared/picture/surface-lobes'
import { glsl } from '~/workers/webgl2/glsl-number'

/** Lit strips a tent may have. */
export const STRIPS_MOST = 8

const radians = (degrees: number) => degrees * Math.PI / 180

/** GLSL: the tent as `light-rig.ts` puts it up, and what a clear mirrors of it to the eye. */
export const TENT_SOURCE = /* glsl */ `
uniform vec4 cloth;
uniform int stripCount;
uniform vec4 stripPlaces[${STRIPS_MOST}];
uniform vec2 stripLights[${STRIPS_MOST}];
uniform float tentGain;

float clothRadiance(vec3 toward) {
  float level = 1.0 - abs(toward.y);
  float radiance = cloth.y + ((toward.y >= 0.0 ? cloth.x : cloth.z) - cloth.y) * (1.0 - level * level);
  float toHole = toward.y * ${glsl(Math.sin(radians(HOLE.elevation)))} + toward.z * ${glsl(Math.cos(radians(HOLE.elevation)))};
  if (toHole < 0.9) return radiance;
  float off = degrees(acos(min(1.0, toHole)));
  return radiance * mix(cloth.w, 1.0, smoothstep(${glsl(HOLE.radius - HOLE.edge)}, ${glsl(HOLE.radius + HOLE.edge)}, off));
}

// place: elevation, azimuth, half height, half width; edge: all in degrees.
float stripShare(vec4 place, float edge, float elevation, float azimuth) {
  float up = abs(elevation - place.x);
  if (up > 180.0) up = 360.0 - up;
  float along = abs(azimuth - place.y);
  return (1.0 - smoothstep(place.z - edge, place.z + edge, up)) * (1.0 - smoothstep(place.w - edge, place.w + edge, along));
}

float tentRadiance(vec3 toward) {
  float elevation = degrees(atan(toward.y, toward.z));
  float azimuth = degrees(asin(clamp(toward.x, -1.0, 1.0)));
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
