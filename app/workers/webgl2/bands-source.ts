/** GLSL: sixteen bands as a matrix of four columns, so that every rule of the bands is one line. */
export const BANDS_SOURCE = /* glsl */ `
// Sixteen bands: four columns of four.
mat4 bandsAt(highp sampler2DArray table, int column, int level, int layer) {
  return mat4(
    texelFetch(table, ivec3(column, level, layer), 0),
    texelFetch(table, ivec3(column + 1, level, layer), 0),
    texelFetch(table, ivec3(column + 2, level, layer), 0),
    texelFetch(table, ivec3(column + 3, level, layer), 0)
  );
}

mat4 evenBands(float value) {
  vec4 four = vec4(value);
  return mat4(four, four, four, four);
}

float total(mat4 weights, mat4 bands) {
  return dot(weights[0], bands[0]) + dot(weights[1], bands[1]) + dot(weights[2], bands[2]) + dot(weights[3], bands[3]);
}

// Linear sRGB of radiance factors.
vec3 linearOf(mat4 bands) {
  return vec3(total(red, bands), total(green, bands), total(blue, bands));
}
`
