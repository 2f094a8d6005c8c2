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
  statSync,
} from 'node:fs';
import { rm } from 'node:fs/promises';
import { join } from 'node:path';
import type { Settings } from '../platform/settings';

type Place = Pick<Settings, 'dataFolder'>;

/**
 * Where films lie: every clip has a folder of its own, `<data>/clips/<clip id>/`, with the file as it came (`film`) and
 * its poster (`poster.jpg`). What is still arriving lies in `<data>/incoming/<id>/` and moves over in one rename, so
 * that a clip's folder is there whole or not at all.
 */
export const clipsFolder = ({ dataFolder }: Place) => join(dataFolder, 'clips');
const incomingFolder = ({ dataFolder }: Place) => join(dataFolder, 'incoming');
export const clipFolder = (place: Place, clipId: string) => join(clipsFolder(place), clipId);
export const filmPath = (folder: string) => join(folder, 'film');
export const posterPath = (folder: string) => join(folder, 'poster.jpg');

/** A fresh folder for one arriving clip. */
export function openIncoming(place: Place): string {
  const folder = join(incomingFolder(place), randomUUID());
  mkdirSync(folder, { recursive: true });
  return folder;
}

export async function dropFolder(folder: string): Promise<void> {
  await rm(folder, { recursive: true, force: true });
}

/**
 * Moves an arrived clip to its place for good. Synchronous on purpose: within a database transaction nothing of this
 * process can come between the move and the row that names it.
 */
export function keepIncoming(place: Place, incoming: string, clipId: string): void {
  const clips = clipsFolder(place);
  mkdirSync(clips, { recursive: true });
  syncToDisk(incoming);
  renameSync(incoming, clipFolder(place, clipId));
  syncToDisk(clips);
}

export function dropClip(place: Place, clipId: string): void {
  rmSync(clipFolder(place, clipId), { recursive: true, force: true });
}

/** Ids of the clip folders there are. */
export function storedClipIds(place: Place): string[] {
  const folder = clipsFolder(place);
  return existsSync(folder) ? readdirSync(folder) : [];
}

/** Folders of uploads that were under way before an instant and will never be finished. */
export function abandonedIncoming(place: Place, before: Date): string[] {
  const folder = incomingFolder(place);
  if (!existsSync(folder)) return [];
  return readdirSync(folder)
    .map((name) => join(folder, name))
    .filter((path) => statSync(path).mtimeMs < before.getTime());
}

/** A renamed or created entry survives a power cut only once its folder is on disk. */
function syncToDisk(path: string): void {
  const handle = openSync(path, 'r');
  try {
    fsyncSync(handle);
  } finally {
    closeSync(handle);
  }
}
