import { drawingSchema, stillPartSchema, type Still } from '@stillstroke/contract/stills';
import type { stills } from '@stillstroke/db/schema/review';
import { z } from 'zod';

const partsSchema = z.array(stillPartSchema);
const drawingsSchema = z.array(drawingSchema);

export function stillAnswer(row: typeof stills.$inferSelect): Still {
  const { id, findingId, layout, overlays, words, width, height, removedAt, version } = row;
  return {
    id,
    findingId,
    layout,
    parts: partsSchema.parse(JSON.parse(row.parts)),
    overlays,
    drawings: drawingsSchema.parse(JSON.parse(row.drawings)),
    words,
    width,
    height,
    removedAt,
    version,
  };
}
