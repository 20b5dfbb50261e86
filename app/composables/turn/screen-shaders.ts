/** GLSL: a triangle that covers the whole target. */
export const WHOLE_VERTEX = /* glsl */ `
precision highp float;
in vec3 position;
void main() { gl_Position = vec4(position.xy, 0.0, 1.0); }
`

/** GLSL: hands the light of one go on, to be added to the others. */
export const ADD_FRAGMENT = /* glsl */ `
precision highp float;
precision highp sampler2D;
uniform sampler2D picture;
out vec4 shown;
void main() { shown = texelFetch(picture, ivec2(gl_FragCoord.xy), 0); }
`

/**
 * GLSL: the mean of all goes, mixed with the surround in linear light and written for the screen as sRGB. What nothing covers is
 * exactly the grey that was asked for; the dither is the same in all three channels, so that greys stay grey.
 */
export const SCREEN_FRAGMENT = /* glsl */ `
precision highp float;
precision highp sampler2D;
uniform sampler2D picture;
uniform vec2 size;
uniform float goes;
uniform float surround;
out vec4 shown;
vec3 encoded(vec3 linear) {
  vec3 value = clamp(linear, 0.0, 1.0);
  return mix(1.055 * pow(value, vec3(1.0 / 2.4)) - 0.055, 12.92 * value, vec3(lessThanEqual(value, vec3(0.0031308))));
}
float decoded(float value) { return value <= 0.04045 ? value / 12.92 : pow((value + 0.055) / 1.055, 2.4); }
float dither(uvec2 at) {
  uint h = at.x * 0x9E3779B1u ^ at.y * 0x85EBCA6Bu;
  h = (h ^ (h >> 15)) * 0x85EBCA6Bu;
  return float((h ^ (h >> 13)) & 0xFFFFu) / 65535.0 * 2.0 - 1.0;
}
void main() {
  vec4 mean = texture(picture, gl_FragCoord.xy / size) / goes;
  if (mean.a <= 0.0) { shown = vec4(vec3(surround), 1.0); return; }
  vec3 linear = mean.rgb + (1.0 - min(1.0, mean.a)) * decoded(surround);
  shown = vec4(encoded(linear) + 0.45 / 255.0 * dither(uvec2(gl_FragCoord.xy)), 1.0);
}
`
