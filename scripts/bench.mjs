/** `npm run bench [frames|readings|api]`: every bench there is, or the one named. Ratios are against references of the same run. */
import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { benchFrames } from './bench/frames.mjs';
import { benchReadings } from './bench/readings.mjs';

const wanted = process.argv[2];
const api = new URL('./bench/api.mjs', import.meta.url);

if (wanted === undefined || wanted === 'frames') await benchFrames();
if (wanted === undefined || wanted === 'readings') await benchReadings();
if ((wanted === undefined || wanted === 'api') && existsSync(fileURLToPath(api))) {
  const { benchApi } = await import(api.href);
  await benchApi();
}
