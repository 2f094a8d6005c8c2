/** `4 left and 3 right strokes measured`; says so when there are none. */
export function sayMeasuredStrokes(strokes: { left: number; right: number } | undefined): string {
  const { left, right } = strokes ?? { left: 0, right: 0 };
  if (left === 0 && right === 0) return 'No stroke measured yet';
  if (left === 0) return `${right} right ${right === 1 ? 'stroke' : 'strokes'} measured`;
  if (right === 0) return `${left} left ${left === 1 ? 'stroke' : 'strokes'} measured`;
  return `${left} left and ${right} right strokes measured`;
}
