import { spawnSync } from 'node:child_process';
import { readFileSync, rmSync, writeFileSync } from 'node:fs';
import { boxAt, parseBoxes, words, writeBoxes } from './boxes.mjs';

/** Writes the files that must be refused into `refused/` and answers their entries for the manifest. */
export function makeRefused(folder) {
  const good = readFileSync(`${folder}b-frames.mp4`);
  const write = (name, bytes) => writeFileSync(`${folder}refused/${name}`, bytes);
  write('empty.mp4', Buffer.alloc(0));
  write('text.mp4', 'Lane four, second length, from the left.\n');
  write('picture.mp4', Buffer.from('89504e470d0a1a0a0000000d49484452', 'hex'));
  write('table-never-written.mp4', good.subarray(0, good.indexOf('moov', 0, 'latin1') - 4));
  write('no-frames.mp4', withoutSamples(good));
  sound(`${folder}refused/sound-only.m4a`);
  return [
    { file: 'refused/empty.mp4', code: 'unreadable' },
    { file: 'refused/text.mp4', code: 'not-a-video' },
    { file: 'refused/picture.mp4', code: 'not-a-video' },
    { file: 'refused/table-never-written.mp4', code: 'unreadable' },
    { file: 'refused/no-frames.mp4', code: 'no-frames' },
    { file: 'refused/sound-only.m4a', code: 'no-video-track' },
  ];
}

function withoutSamples(bytes) {
  const boxes = parseBoxes(bytes);
  const table = boxAt(boxes, 'moov/trak/mdia/minf/stbl').children;
  for (const type of ['stts', 'ctts', 'stsc', 'stco', 'stss']) boxAt(table, type).body = words(0, 0);
  boxAt(table, 'stsz').body = words(0, 0, 0);
  return writeBoxes(boxes);
}

function sound(path) {
  rmSync(path, { force: true });
  const tone = ['-f', 'lavfi', '-i', 'sine=frequency=440:duration=1', '-c:a', 'aac', '-b:a', '24k'];
  const done = spawnSync('ffmpeg', ['-loglevel', 'error', '-y', ...tone, '-fflags', '+bitexact', path]);
  if (done.status !== 0) throw new Error(`${path}: ${done.stderr}`);
}
