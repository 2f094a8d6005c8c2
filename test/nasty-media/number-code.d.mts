export function fieldsOf(number: number): number[];
export function readNumber(
  width: number,
  height: number,
  lightAt: (x: number, y: number) => number,
): number | null;
