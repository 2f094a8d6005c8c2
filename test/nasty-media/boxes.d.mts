export interface Box {
  type: string;
  body?: Buffer;
  header?: number;
  children?: Box[];
}
export interface Leaf extends Box {
  body: Buffer;
}
export function parseBoxes(bytes: Buffer): Box[];
export function writeBoxes(boxes: Box[]): Buffer;
export function boxAt(boxes: Box[], path: string): Leaf | null;
export function sampleRanges(boxes: Box[]): { offset: number; size: number }[];
export function words(...numbers: number[]): Buffer;
