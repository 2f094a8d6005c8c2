/**
 * Makes the clips of this folder and `manifest.json`. Needs `ffmpeg` with libx264, libx265, libvpx and libaom on the
 * path; the files are committed, so nothing else needs it. Run: `node test/nasty-media/make.mjs [name…]`
 */
import { spawnSync } from 'node:child_process';
import { mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { fileURLToPath } from 'node:url';
import { clips } from './clips.mjs';
import { fieldsOf } from './number-code.mjs';
import { makeRefused } from './refused.mjs';

const FOLDER = fileURLToPath(new URL('./', import.meta.url));

/** One picture as shown: the number's fields with a little grain, so that packets have something to carry. */
function shownPicture(width, height, number) {
  const fields = fieldsOf(number);
  const light = new Uint8Array(width * height);
  let grain = (number + 1) * 2654435761;
  for (let y = 0; y < height; y += 1) {
    for (let x = 0; x < width; x += 1) {
      const field = Math.floor((y * 4) / height) * 4 + Math.floor((x * 4) / width);
      grain = (Math.imul(grain, 1664525) + 1013904223) >>> 0;
      light[y * width + x] = (fields[field] ? 205 : 30) + (grain >>> 27);
    }
  }
  return light;
}

/** Turns the shown picture back into how a camera with that rotation and mirroring stores it. */
function storedPicture(clip, number) {
  const turned = clip.rotation === 90 || clip.rotation === 270;
  const [shownWidth, shownHeight] = turned ? [clip.height, clip.width] : [clip.width, clip.height];
  const shown = shownPicture(shownWidth, shownHeight, number);
  const stored = new Uint8Array(clip.width * clip.height);
  for (let y = 0; y < clip.height; y += 1) {
    for (let x = 0; x < clip.width; x += 1) {
      let [u, v] = placeAfterTurn(x, y, clip);
      if (clip.mirrored) u = shownWidth - 1 - u;
      stored[y * clip.width + x] = shown[v * shownWidth + u];
    }
  }
  return stored;
}

/** Where a stored pixel lands when the picture is turned clockwise by the clip's rotation. */
function placeAfterTurn(x, y, { rotation = 0, width, height }) {
  if (rotation === 90) return [height - 1 - y, x];
  if (rotation === 180) return [width - 1 - x, height - 1 - y];
  if (rotation === 270) return [y, width - 1 - x];
  return [x, y];
}

function rawVideo(clip) {
  const chroma = Buffer.alloc(2 * Math.ceil(clip.width / 2) * Math.ceil(clip.height / 2), 128);
  const parts = [];
  for (let number = 0; number < clip.pictures; number += 1) parts.push(storedPicture(clip, number), chroma);
  return Buffer.concat(parts);
}

function encode(clip) {
  const path = `${FOLDER}${clip.file}`;
  const raw = clip.from ? undefined : rawVideo(clip);
  const picture = ['-f', 'rawvideo', '-pix_fmt', 'yuv420p', '-s', `${clip.width}x${clip.height}`];
  const input = clip.from
    ? ['-i', `${FOLDER}${clip.from}`]
    : [...picture, '-r', String(clip.rate ?? 30), '-i', '-'];
  const tone = `sine=frequency=440:duration=${clip.pictures / 30}`;
  const sound = clip.sound ? ['-f', 'lavfi', '-i', tone] : [];
  const exact = ['-map_metadata', '-1', '-fflags', '+bitexact', '-flags:v', '+bitexact', '-threads', '1'];
  if (clip.twoPass) {
    const log = ['-passlogfile', `${tmpdir()}/nasty-media`];
    runFfmpeg(clip, raw, [...input, ...clip.encode, ...log, '-pass', '1', '-f', 'null', '-']);
    runFfmpeg(clip, raw, [...input, ...clip.encode, ...log, '-pass', '2', ...exact, path]);
  } else {
    runFfmpeg(clip, raw, [...input, ...sound, ...clip.encode, ...exact, path]);
  }
  if (clip.patch) writeFileSync(path, clip.patch(readFileSync(path)));
}

function runFfmpeg(clip, input, args) {
  const quiet = ['-hide_banner', '-loglevel', 'error', '-y'];
  const done = spawnSync('ffmpeg', [...quiet, ...args], { input, maxBuffer: 1 << 28 });
  if (done.error || done.status !== 0)
    throw new Error(`${clip.file}: ${done.error ?? done.stderr.toString()}`);
}

/** What a reader must find: frame n carries the number `firstNumber + n`, unless listed otherwise. */
function manifestEntry(clip) {
  const turned = clip.rotation === 90 || clip.rotation === 270;
  const wide = Math.round(clip.width * (clip.pixelAspect ?? 1));
  return {
    file: clip.file,
    note: clip.note,
    frames: clip.frames ?? clip.pictures,
    firstNumber: clip.firstNumber ?? 0,
    width: turned ? clip.height : wide,
    height: turned ? wide : clip.height,
    truncated: clip.truncated ?? false,
    steady: clip.steady ?? true,
    ...(clip.numbers ? { numbers: clip.numbers } : {}),
    damaged: clip.damaged ?? [],
    ...(clip.unsupported ? { unsupported: true } : {}),
  };
}

mkdirSync(`${FOLDER}refused`, { recursive: true });
const wanted = process.argv.slice(2);
for (const clip of clips) {
  if (wanted.length > 0 && !wanted.some((name) => clip.file.startsWith(name))) continue;
  rmSync(`${FOLDER}${clip.file}`, { force: true });
  encode(clip);
}
const refused = makeRefused(FOLDER);
writeFileSync(
  `${FOLDER}manifest.json`,
  `${JSON.stringify({ clips: clips.map(manifestEntry), refused }, null, 2)}\n`,
);
