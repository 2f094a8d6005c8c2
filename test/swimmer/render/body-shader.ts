import { CARRIED, CAUSTICS, HEAD, WATER_COLOURS } from './shader-parts';

/** Draws the swimmer in parallel projection into a texture of its own, colour multiplied by coverage. */
export const BODY_VERTEX = `${HEAD}
in vec3 place;
in vec3 normal;
in vec3 colour;
in float material;
in vec3 local;
uniform vec2 size;
uniform vec4 frame;      // pixels per metre, lens depth, offset ahead in pixels, drift in metres
uniform vec3 facing;     // side view: sign of travel, sign of near arm; z = 1 for a front view
uniform vec2 roll;       // cosine, sine
out vec3 vPlace; out vec3 vNormal; out vec3 vColour; out vec3 vLocal; out float vMaterial; out float vNear;
void main() {
  vec2 level = vec2((place.x + frame.w) * frame.x + frame.z, (place.y - frame.y) * frame.x);
  float near = place.z * facing.y;
  if (facing.z > 0.5) { level.x = -place.z * frame.x; near = place.x; }
  else level.x *= facing.x;
  vec2 turned = vec2(level.x * roll.x + level.y * roll.y, -level.x * roll.y + level.y * roll.x);
  gl_Position = vec4(2.0 * turned.x / size.x, -2.0 * turned.y / size.y, -near * 0.35, 1.0);
  vPlace = place; vNormal = normal; vColour = colour; vLocal = local; vMaterial = material; vNear = near;
}`;

export const BODY_FRAGMENT = `${HEAD}
in vec3 vPlace; in vec3 vNormal; in vec3 vColour; in vec3 vLocal; in float vMaterial; in float vNear;
uniform vec3 suit; uniform vec3 cap; uniform float suitCut; uniform float time; uniform float ahead; uniform vec3 facing;
uniform vec4 frame; uniform vec2 size;
out vec4 result;
${CARRIED}${CAUSTICS}${WATER_COLOURS}
float softStep(float x) { float w = fwidth(x) + 1e-5; return smoothstep(-w, w, x); }

vec3 albedo(out float gloss) {
  gloss = 0.06;
  vec3 skin = vColour;
  if (vMaterial > 2.5) {
    // Head: local = along crown, face, side (unit). Cap over crown and back, strap of the goggles.
    float edge = vLocal.x * 0.75 - vLocal.y * 0.85 + 0.02;
    vec3 capped = cap * (0.94 + 0.06 * sin(vLocal.x * 24.0));
    vec3 c = mix(skin, capped, smoothstep(0.0, 0.03, edge));
    gloss = edge > 0.0 ? 0.16 : gloss;
    float strap = abs(vLocal.x - 0.27 - 0.16 * min(vLocal.y, 0.0));
    c = mix(c, vec3(0.012, 0.015, 0.02), softStep(0.045 - strap) * smoothstep(0.18, 0.22, abs(vLocal.z)));
    return c;
  }
  if (vMaterial > 1.5) {
    float cloth = suitCut > 0.5 ? softStep(0.27 - vLocal.x) : 0.0;
    gloss += 0.05 * cloth;
    return mix(skin, suit * (1.0 - 0.4 * softStep(vLocal.x - 0.256)), cloth);
  }
  if (vMaterial < 0.5) return skin;
  float belly = vLocal.z;
  float flank = abs(vLocal.y);
  float place = vLocal.x;
  float cloth;
  if (suitCut > 0.5) cloth = softStep(-0.47 - place);
  else {
    float legCut = -0.63 + 0.085 * smoothstep(0.45, 1.0, flank);
    float front = -0.085 - 0.1 * smoothstep(0.35, 0.95, flank);
    float back = -0.33 + 0.1 * smoothstep(0.5, 1.0, flank);
    float topEdge = mix(back, front, smoothstep(-0.25, 0.35, belly));
    float strap = softStep(0.12 - abs(flank - 0.54)) * softStep(place + 0.36) * softStep(0.75 - belly) * softStep(0.06 - place);
    cloth = max(softStep(topEdge - place) * softStep(place - legCut), strap);
  }
  gloss += 0.05 * cloth;
  float stripe = smoothstep(0.86, 0.92, flank) * 0.45 * (1.0 - step(0.5, suitCut));
  return mix(skin, mix(suit, suit * 2.6 + 0.02, stripe), cloth);
}

void main() {
  vec3 n = normalize(vNormal);
  float gloss;
  vec3 base = albedo(gloss);
  vec3 toEye = facing.z > 0.5 ? vec3(1.0, 0.0, 0.0) : vec3(0.0, 0.0, facing.y);
  float up = -n.y;
  float depth = max(vPlace.y, 0.0);
  float net = lightNet(vec2((vPlace.x + ahead) * 9.0, vPlace.z * 9.0 + vPlace.y * 4.0), time * 1.6);
  float sun = max(0.0, dot(n, normalize(vec3(0.25, -1.0, 0.15 * facing.y)))) ;
  float sky = 0.5 + 0.5 * up;
  float belowTrunk = smoothstep(0.18, 0.02, abs(vPlace.z)) * smoothstep(0.12, 0.3, depth) * smoothstep(0.25, 0.0, vPlace.x) * smoothstep(-0.75, -0.5, vPlace.x);
  vec3 light = vec3(0.14, 0.27, 0.33) * (0.26 + 0.72 * sky) * (1.0 - 0.35 * belowTrunk)
    + vec3(1.12, 1.02, 0.88) * sun * (0.30 + 0.75 * net) * exp(-depth * 0.9) * (1.0 - 0.55 * belowTrunk);
  light += vec3(0.07, 0.15, 0.18) * max(0.0, dot(n, toEye)) ;
  vec3 c = base * light * 1.55;
  float rim = pow(1.0 - abs(dot(n, toEye)), 2.6);
  c += vec3(0.10, 0.38, 0.46) * rim * (0.22 + 0.5 * sky) * 0.62;
  vec3 h = normalize(toEye + vec3(0.1, -1.0, 0.0));
  c += gloss * vec3(0.8, 1.0, 1.0) * pow(max(0.0, dot(n, h)), 24.0);
  float y = clamp(0.5 + (vPlace.y - frame.y) * frame.x / size.y, 0.0, 1.0);
  float veil = facing.z > 0.5 ? clamp(0.16 - vPlace.x * 0.28, 0.06, 0.8) : clamp(0.20 - 0.95 * vNear, 0.07, 0.56);
  c = mix(c * vec3(0.94, 1.0, 0.98), waterAt(y) * 0.95, veil);
  result = vec4(carried(c), 1.0);
}`;

/** Bubbles: points with a bright rim and a glint, drawn over the swimmer where nothing of the body is nearer. */
export const BUBBLE_VERTEX = `${HEAD}
in vec3 place; in vec2 looks;
uniform vec2 size; uniform vec4 frame; uniform vec3 facing; uniform vec2 roll;
out float vSolid; out float vPixels; out float vDepth;
void main() {
  vec2 level = vec2((place.x + frame.w) * frame.x + frame.z, (place.y - frame.y) * frame.x);
  float near = place.z * facing.y;
  if (facing.z > 0.5) { level.x = -place.z * frame.x; near = place.x; }
  else level.x *= facing.x;
  vec2 turned = vec2(level.x * roll.x + level.y * roll.y, -level.x * roll.y + level.y * roll.x);
  gl_Position = vec4(2.0 * turned.x / size.x, -2.0 * turned.y / size.y, -near * 0.35 - 0.012, 1.0);
  vPixels = max(2.6, 2.0 * looks.x * frame.x);
  gl_PointSize = vPixels;
  vSolid = looks.y * min(1.0, 2.0 * looks.x * frame.x / 1.6);
  vDepth = place.y;
}`;

export const BUBBLE_FRAGMENT = `${HEAD}
in float vSolid; in float vPixels; in float vDepth;
out vec4 result;
${CARRIED}
void main() {
  vec2 q = gl_PointCoord * 2.0 - 1.0;
  float r = length(q);
  float soft = 2.0 / vPixels;
  float inside = 1.0 - smoothstep(1.0 - soft, 1.0, r);
  float rim = smoothstep(0.45, 0.95, r);
  float glint = 1.0 - smoothstep(0.0, 0.42, length(q - vec2(-0.28, -0.38)));
  float small = 1.0 - smoothstep(4.0, 8.0, vPixels);
  vec3 c = mix(vec3(0.10, 0.42, 0.50), vec3(0.62, 0.93, 0.98), clamp(rim * 0.5 + 0.45 * (0.5 - 0.5 * q.y), 0.0, 1.0)) + glint * 0.6;
  float alpha = inside * vSolid * mix(0.26 + 0.6 * rim + 0.6 * glint, 0.8, small) * exp(-max(vDepth, 0.0) * 0.3);
  result = vec4(carried(c) * alpha, alpha);
}`;
