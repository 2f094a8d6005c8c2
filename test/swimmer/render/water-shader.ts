import { CARRIED, CAUSTICS, HEAD, WATER_COLOURS, WAVES } from './shader-parts';

/**
 * The pool behind and above the swimmer, and the final picture. Each pixel is turned back by the camera's roll, sent out
 * as a ray, and meets the surface from below, the wall or the floor; lane lines are crossed on the way.
 */
export const SCREEN_VERTEX = `${HEAD}
in vec2 corner;
void main() { gl_Position = vec4(corner, 0.0, 1.0); }`;

const SCENERY = `
const vec3 TILE = vec3(0.17, 0.46, 0.53);

float groutLine(float x, float width) {
  float w = max(width, fwidth(x) * 1.2);
  float d = abs(fract(x) - 0.5);
  return smoothstep(0.5 - w, 0.5 - w * 0.35, d) * clamp(width / fwidth(x) * 1.5, 0.15, 1.0);
}

float hash(vec2 p) { return fract(sin(dot(p, vec2(127.1, 311.7))) * 43758.5453); }

vec3 tiles(vec2 p, float net, float shade) {
  float grout = max(groutLine(p.x, 0.05), groutLine(p.y, 0.05));
  float vary = hash(floor(p)) * 0.10 - 0.05;
  vec3 c = TILE * (0.92 + vary);
  c = mix(c, TILE * 0.50, grout * 0.75);
  return c * (shade + 0.40 * net);
}

vec3 sideWall(vec2 p, float net) {
  // p: metres along and down. A dark band every 5 m and a course of dark tiles below the rim.
  vec3 c = tiles(p / 0.2, net, 0.62);
  float band = 1.0 - smoothstep(0.118, 0.122, abs(mod(p.x, 5.0) - 2.5));
  c = mix(c, vec3(0.012, 0.055, 0.11) * (0.8 + 0.5 * net), band * 0.9);
  float course = smoothstep(0.0, 0.01, p.y - 0.02) * (1.0 - smoothstep(0.15, 0.16, p.y - 0.02));
  return mix(c, vec3(0.03, 0.12, 0.24) * (0.9 + 0.6 * net), course * 0.75);
}

vec3 poolFloor(vec2 p, float across, float net) {
  // p: metres along and away; across: metres from the middle of the nearest lane.
  vec3 c = tiles(p / 0.25, net, 0.50);
  float mark = 1.0 - smoothstep(0.12, 0.13, abs(across));
  return mix(c, vec3(0.010, 0.045, 0.10) * (0.7 + 0.8 * net), mark * 0.92);
}

/** A float of a lane line seen from below: xy in metres from its middle; returns colour and coverage. */
vec4 laneFloat(float along, float down) {
  float cell = along / 0.13;
  float index = floor(cell);
  float x = (fract(cell) - 0.5) * 0.13;
  float rounded = length(max(abs(vec2(x, down)) - vec2(0.030, 0.034), 0.0)) - 0.018;
  float soft = fwidth(down) * 1.2 + 0.001;
  float cover = 1.0 - smoothstep(-soft, soft, rounded);
  float which = mod(index, 10.0);
  vec3 c = which < 5.0 ? laneLine : laneMark;
  float round3 = sqrt(max(0.0, 1.0 - pow(down / 0.055, 2.0)));
  float ribs = 0.88 + 0.12 * step(0.5, fract(x * 70.0));
  float lit = 0.30 + 0.45 * round3 + 0.45 * smoothstep(0.03, -0.05, down);
  float rope = 1.0 - smoothstep(0.006, 0.006 + soft, abs(down));
  vec3 shown = mix(vec3(0.20, 0.30, 0.32), c * lit * ribs, cover);
  return vec4(shown, max(cover, rope * 0.9));
}

vec3 veiled(vec3 c, float distance, vec3 water) {
  return mix(c * exp(-distance * vec3(0.10, 0.022, 0.018)), water, 1.0 - exp(-distance * 0.12));
}
`;

const PLACES = `
/** What a level ray (u right, v down, per metre away) meets below the surface. */
vec3 scenery(vec2 ray, float t, vec3 water) {
  float u = ray.x; float v = ray.y;
  float wallAt = front ? ENDWALL : WALL;
  float z = wallAt;
  bool onFloor = v > 0.0 && (FLOOR - lensDepth) / v < wallAt;
  if (onFloor) z = (FLOOR - lensDepth) / v;
  float x = u * z;
  float down = lensDepth + v * z;
  vec3 c;
  if (front) {
    float alongFloor = travelled + SWIMMER - z;
    float net = lightNet(vec2(x, alongFloor) * 4.6, t * 1.3);
    float across = mod(x + 1.25, 2.5) - 1.25;
    c = onFloor ? poolFloor(vec2(alongFloor, x), across, net) * 0.6 : sideWall(vec2(x + 2.5, down), net) * 0.7;
  } else {
    float alongPool = travelled + x * side;
    float net = lightNet(vec2(alongPool, onFloor ? z : down * 1.5) * 4.6, t * 1.3);
    float across = mod(z - SWIMMER + 1.25, 2.5) - 1.25;
    c = onFloor ? poolFloor(vec2(alongPool, z), across, net) : sideWall(vec2(alongPool, down), net);
    c *= onFloor ? 0.34 : mix(0.95, 0.34, smoothstep(0.1, FLOOR, down));
  }
  return veiled(c, z, water);
}

/** The surface from below: mostly a mirror of the pool, broken by waves, with light coming through where they are steep. */
vec3 surface(vec2 ray, float t, vec3 water, vec3 mirrored) {
  float z = lensDepth / max(-ray.y, 0.02);
  vec2 p = front ? vec2(ray.x * z, travelled + SWIMMER - z) : vec2(travelled + ray.x * z * side, z);
  float near = clamp(3.6 / z, 0.0, 1.6);
  float a = sin(p.x * 3.3 + 1.6 * sin(p.y * 2.2 + t * 1.1) + t * 1.3) + sin(p.y * 5.3 - 1.4 * sin(p.x * 2.7 - t) + t * 1.9);
  float b = sin(p.x * 8.7 + p.y * 4.1 + 1.2 * sin(p.x * 3.1 + t) + t * 2.6) * 0.6;
  float steep = a * 0.5 + b;
  float window = smoothstep(0.55, 1.35, steep) ;
  float dark = smoothstep(-0.5, -1.4, steep);
  vec3 c = mix(mirrored, water * 1.18, 0.55);
  c = mix(c, c * 0.66, dark * 0.6 * near);
  c += vec3(0.42, 0.66, 0.66) * window * near * 0.50;
  c += vec3(0.75, 0.95, 0.95) * pow(lightNet(p * vec2(2.2, 2.2), t * 2.0), 2.0) * 0.24 * near;
  return c;
}
`;

const SHAFTS = `
float shafts(vec2 level, float t) {
  // Seen along slanted lines that meet far above the picture; fading with depth.
  vec2 q = level / size.y;
  float s = (q.x + q.y * 0.36) / (1.25 + 0.55 * q.y);
  s = s * 3.0 - travelled * side * 0.11 * (front ? 0.0 : 1.0);
  float a = sin(s * 3.1 + 0.5 * sin(t * 0.5) + 1.0) + 0.7 * sin(s * 7.3 - t * 0.33) + 0.45 * sin(s * 15.7 + t * 0.61 + 2.0);
  float fade = 1.0 - smoothstep(-0.45, 0.62, q.y);
  return smoothstep(0.0, 1.9, a) * fade;
}
`;

/** Turns a picture pixel (y down) into level pixels from the middle and back. */
const LEVEL = `
vec2 levelOf(vec2 pixel) {
  vec2 c = pixel - size * 0.5;
  return vec2(c.x * roll.x - c.y * roll.y, c.x * roll.y + c.y * roll.x);
}
vec2 pixelOf(vec2 level) {
  return vec2(level.x * roll.x + level.y * roll.y, -level.x * roll.y + level.y * roll.x) + size * 0.5;
}
/** How waves shake what is mirrored in the surface, per metre away. */
float shakeAt(float along, float y, float t) {
  return 0.010 * sin(along * 9.0 + t * 3.1 + y * 0.05) + 0.006 * sin(along * 23.0 - t * 4.0);
}
`;

const BACKDROP = `
void main() {
  vec2 pixel = vec2(gl_FragCoord.x / coarse, size.y - gl_FragCoord.y / coarse);
  vec2 level = levelOf(pixel);
  float t = time;
  vec2 ray = level / (frame.x * SWIMMER);
  float along = front ? level.x / frame.x : travelled + level.x * side / frame.x;
  vec3 water = waterAt(clamp(0.5 + level.y / size.y, 0.0, 1.0));
  bool above = ray.y < 0.0 && lensDepth / -ray.y < (front ? ENDWALL : WALL);

  // A look at the surface is a look at the pool turned upside down, shaken by the waves.
  float shake = above ? shakeAt(along, level.y, t) : 0.0;
  vec2 down = above ? vec2(ray.x + shake * 0.5, -ray.y * 0.9 + shake) : ray;
  vec3 c = scenery(down, t, water);
  if (above) c = surface(ray, t, water, c);

  if (front) {
    float lane = sign(ray.x) * LANE * 0.96;
    float z = lane / (abs(ray.x) < 1e-4 ? 1e-4 : ray.x);
    vec4 f = laneFloat(travelled + SWIMMER - z, lensDepth + ray.y * z);
    if (z > 1.2 && z < ENDWALL) c = mix(c, veiled(f.rgb, z, water), f.a * smoothstep(1.2, 2.2, z));
  } else {
    float z = SWIMMER + LANE;
    float x = travelled + ray.x * z * side;
    float bob = 0.014 * sin(x * 2.1 + t * 1.9);
    vec4 f = laneFloat(x, lensDepth + ray.y * z + bob - 0.012);
    c = mix(c, veiled(f.rgb, z, water), f.a);
  }
  float beam = shafts(level, t);
  c += vec3(0.26, 0.55, 0.58) * beam * (0.05 + 0.42 * water.g);
  result = vec4(carried(c), beam);
}`;

const FINISH = `
vec2 uv(vec2 pixel) { return vec2(pixel.x / size.x, 1.0 - pixel.y / size.y); }

/** Cord with a bob that hangs from the camera's frame: a true vertical. */
void plumb(vec2 level, inout vec3 c) {
  if (cord.x > 9000.0) return;
  float unit = size.y / 540.0;
  float x = abs(level.x - cord.x);
  float line = 1.0 - smoothstep(0.55 * unit, 1.35 * unit, x);
  if (level.y > cord.y) line = 0.0;
  c = mix(c, vec3(0.80, 0.88, 0.84), line * 0.9);
  vec2 q = vec2(x, level.y - cord.y) / unit;
  float neck = q.y < 7.0 ? 5.2 * smoothstep(0.0, 5.0, q.y) : 5.2 * (1.0 - smoothstep(6.0, 23.0, q.y));
  float inBob = q.y > 0.0 && q.y < 23.0 ? 1.0 - smoothstep(neck - 0.6, neck + 0.6, q.x) : 0.0;
  float shine = 0.45 + 0.75 * smoothstep(2.5, 0.0, abs((level.x - cord.x) / unit + 1.6));
  c = mix(c, vec3(0.78, 0.58, 0.24) * shine * 0.85, inBob);
}

vec3 shown(vec3 c) {
  c = max(c, 0.0);
  c = c * (1.0 + c * 0.16) / (1.0 + c * 0.52);
  return pow(c * 1.10, vec3(1.0 / 2.2));
}

void main() {
  vec2 pixel = vec2(gl_FragCoord.x, size.y - gl_FragCoord.y);
  vec2 level = levelOf(pixel);
  float t = time;
  float along = front ? level.x / frame.x : travelled + level.x * side / frame.x;
  float line = -(lensDepth + waveLine(along, t)) * frame.x;
  vec4 back = texture(backdrop, uv(pixel));
  vec3 c = back.rgb;
  vec4 b = texture(body, uv(pixel));
  if (level.y < line) {
    // Above the water line of the swimmer's plane: only the mirror image of what is below, broken by waves.
    float height = line - level.y;
    float sway = shakeAt(along, level.y, t) * 30.0 + 3.0 * sin(height * 0.22 + t * 5.0);
    vec4 m = texture(body, uv(pixelOf(vec2(level.x + sway, line + height * 0.85))));
    float keep = 0.70 * exp(-height / (0.15 * frame.x));
    c = c * (1.0 - m.a * keep) + m.rgb * keep;
  } else {
    c = c * (1.0 - b.a) + b.rgb;
  }
  c = linearOf(c);
  float edge = (level.y - line) / frame.x;
  float glow = exp(-edge * edge * 14000.0) * (0.6 + 0.4 * sin(along * 7.0 + t * 2.0)) + 0.35 * exp(-abs(edge) * 26.0);
  c += vec3(0.46, 0.66, 0.66) * glow * 0.30;
  c += vec3(0.24, 0.42, 0.44) * back.a * b.a * 0.09;
  plumb(level, c);
  vec2 v = (pixel - size * 0.5) / size;
  c *= 1.0 - 0.62 * dot(v, v);
  // A still pattern of half a step keeps slow gradients from showing as bands.
  float dither = fract(52.98 * fract(dot(pixel, vec2(0.0671, 0.00584)))) - 0.5;
  result = vec4(shown(c) + dither * 0.006, 1.0);
}`;

const UNIFORMS = `
uniform vec2 size; uniform vec4 frame; uniform vec2 roll; uniform float time; uniform float travelled; uniform float side;
uniform bool front; uniform float lensDepth;
out vec4 result;
`;

/** Pool without the swimmer, at `coarse` of the picture's resolution: it lies behind the plane in focus. Alpha: light shafts. */
export const BACKDROP_FRAGMENT = (constants: Readonly<Record<string, number>>): string => `${HEAD}
${Object.entries(constants)
  .map(([name, value]) => `const float ${name} = ${value.toFixed(4)};`)
  .join('\n')}
${UNIFORMS}
uniform float coarse; uniform vec3 laneLine; uniform vec3 laneMark;
${CAUSTICS}${WATER_COLOURS}${SCENERY}${PLACES}${SHAFTS}${LEVEL}${CARRIED}${BACKDROP}`;

/** Backdrop, swimmer and mirror image put together, with the cord, and a soft fall-off to the corners. */
export const FINISH_FRAGMENT = `${HEAD}
${UNIFORMS}
uniform vec2 cord; uniform sampler2D body; uniform sampler2D backdrop;
${WAVES}${LEVEL}${CARRIED}${FINISH}`;
