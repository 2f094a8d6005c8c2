import { randomUUID } from 'node:crypto';
import {
  closeSync,
  existsSync,
  fsyncSync,
  mkdirSync,
  openSync,
  readdirSync,
  renameSync,
  rmSync,
} from 'node:fs';
import { join } from 'node:path';
import type { Settings } from '../platform/settings';

type Place = Pick<Settings, 'dataFolder'>;

/**
 * Where the pictures of reviews lie: `<data>/stills/<file id>.jpg`. While a picture is being made its name ends
 * otherwise, so that one under its name is whole. A picture is never written over: a new one gets a new id.
 */
export const stillsFolder = ({ dataFolder }: Place) => join(dataFolder, 'stills');
export const pictureName = (fileId: string) => `${fileId}.jpg`;
export const picturePath = (place: Place, fileId: string) => join(stillsFolder(place), pictureName(fileId));

/** Paths for a picture as it came and as it is made anew. */
export function openPicture(place: Place): { fileId: string; came: string; made: string } {
  const folder = stillsFolder(place);
  mkdirSync(folder, { recursive: true });
  const fileId = randomUUID();
  return { fileId, came: join(folder, `${fileId}.came`), made: join(folder, `${fileId}.made`) };
}

/** Gives a made picture its name for good. */
export function keepPicture(place: Place, { fileId, made }: { fileId: string; made: string }): void {
  const handle = openSync(made, 'r');
  try {
    fsyncSync(handle);
  } finally {
    closeSync(handle);
  }
  renameSync(made, picturePath(place, fileId));
  const folder = openSync(stillsFolder(place), 'r');
  try {
    fsyncSync(folder);
  } finally {
    closeSync(folder);
  }
}

export function dropPictures(place: Place, fileIds: readonly (string | null)[]): void {
  for (const fileId of fileIds) if (fileId !== null) rmSync(picturePath(place, fileId), { force: true });
}

/** Names of all files in the folder of pictures. */
export function storedPictures(place: Place): string[] {
  const folder = stillsFolder(place);
  return existsSync(folder) ? readdirSync(folder) : [];
}
