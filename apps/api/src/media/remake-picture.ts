import { writeFile } from 'node:fs/promises';
import { Jimp } from 'jimp';

const JPEG_QUALITY = 90;

/** Decodes a picture and writes its pixels, and nothing else that came with them, as a JPEG. */
export async function remakePicture(path: string, made: string): Promise<{ width: number; height: number }> {
  const { bitmap } = await Jimp.read(path);
  const { data, width, height } = bitmap;
  // Another picture of the same pixels: what a decoder hangs onto its own does not come along.
  const picture = new Jimp({ data: Buffer.from(data), width, height });
  await writeFile(made, await picture.getBuffer('image/jpeg', { quality: JPEG_QUALITY }), { flush: true });
  return { width, height };
}
