import type { Film } from './cast';
import { swimmerMotion } from './model/swimmer-motion';
import { type FilmTruth, filmTruth } from './model/truth';

/** The true values of a film of the cast. Throws when nothing in its picture hangs plumb. */
export function trueFilm({ name, style, camera, frames, framesPerSecond, cord }: Film): FilmTruth {
  if (!cord) throw new Error(`${name} has no plumb in the picture.`);
  const motion = swimmerMotion(style, frames / framesPerSecond);
  return filmTruth({ file: `${name}.mp4`, motion, camera, frameCount: frames, framesPerSecond, cord });
}
