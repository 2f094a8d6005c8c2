/**
 * Pieces that the shaders share. Colours are linear light within a shader and half their square root between shaders, so
 * that eight bits carry them without steps in the dark.
 */

export const HEAD = `#version 300 es
precision highp float;
`;

/** Moving net of light that waves throw: bright thin lines, about 0 to 1, mean near 0.25. */
export const CAUSTICS = `
float lightNet(vec2 p, float t) {
  vec2 q = p + 0.35 * vec2(sin(p.y * 1.3 + t * 0.7), cos(p.x * 1.1 - t * 0.6));
  float a = sin(q.x * 2.1 + 1.3 * sin(q.y * 1.7 + t * 0.9) + t * 0.5);
  float b = sin(q.y * 2.3 + 1.3 * sin(q.x * 1.5 - t * 0.8) - t * 0.4);
  float c = sin((q.x + q.y) * 1.6 + 1.1 * sin((q.x - q.y) * 1.9 + t) + t * 0.3);
  float lines = (1.0 - abs(a)) * (1.0 - abs(b)) + 0.8 * (1.0 - abs(c)) * (1.0 - abs(a + b) * 0.5);
  return clamp(lines * lines * 1.4, 0.0, 1.3);
}
`;

export const WATER_COLOURS = `
uniform float green;
vec3 waterAt(float y) {
  // y: 0 at the top of the picture, 1 at its bottom.
  vec3 top = mix(vec3(0.130, 0.500, 0.570), vec3(0.150, 0.520, 0.480), green);
  vec3 middle = mix(vec3(0.012, 0.172, 0.250), vec3(0.016, 0.184, 0.200), green);
  vec3 deep = mix(vec3(0.0020, 0.036, 0.068), vec3(0.0028, 0.042, 0.056), green);
  return y < 0.36 ? mix(top, middle, smoothstep(0.0, 0.36, y)) : mix(middle, deep, smoothstep(0.30, 1.05, y));
}
`;

export const WAVES = `
/** Height of the surface where it cuts the swimmer's plane, pixels, + up, by metres along the pool. */
float waveLine(float x, float t) {
  return 0.012 * sin(x * 3.1 + t * 1.7) + 0.008 * sin(x * 6.7 - t * 2.9 + 1.0) + 0.004 * sin(x * 14.0 + t * 4.1);
}
`;

export const CARRIED = `
vec3 carried(vec3 linear) { return sqrt(clamp(linear * 0.5, 0.0, 1.0)); }
vec3 linearOf(vec3 carried) { return carried * carried * 2.0; }
`;
