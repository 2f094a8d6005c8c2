import { fileURLToPath } from 'node:url';
import { makeClip } from './make-clip.mjs';

const FOLDER = fileURLToPath(new URL('../../.cache/bench/', import.meta.url));

/** What is measured: the clip of the goals, the same as phones write it, and a large one. */
export const clips = [
  {
    name: '1080p60, key frame every 250, B-frames',
    file: '1080p60-b.mp4',
    shape: { width: 1920, height: 1080, rate: 60, frames: 1500, keyEvery: 250, bFrames: 2 },
    samples: { seeks: 16, steps: 60, videoSteps: 8 },
  },
  {
    name: '1080p60, key frame every 250, no B-frames',
    file: '1080p60.mp4',
    shape: { width: 1920, height: 1080, rate: 60, frames: 1500, keyEvery: 250, bFrames: 0 },
    samples: { seeks: 16, steps: 60, videoSteps: 8 },
  },
  {
    name: '2160p60, key frame every 60, no B-frames',
    file: '2160p60.mp4',
    shape: { width: 3840, height: 2160, rate: 60, frames: 300, keyEvery: 60, bFrames: 0 },
    samples: { seeks: 8, steps: 30, videoSteps: 5 },
  },
];

/** Makes what is missing and answers the file of each clip by its name. */
export async function prepareClips(wanted) {
  for (const { file, shape } of wanted) await makeClip(`${FOLDER}${file}`, shape);
  return (file) => `${FOLDER}${file}`;
}
