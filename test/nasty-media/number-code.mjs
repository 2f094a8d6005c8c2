/**
 * A frame's number written into its picture as a grid of 4 × 4 black and white fields that fills it, so that a reader can
 * tell which frame it looks at, and that it is upright, unmirrored and drawn to its edges.
 *
 * Row by row: top-left field white, top-right black, bottom-left black, bottom-right even parity of the number; the
 * other twelve fields hold the number, highest bit first.
 */
const FIXED = new Map([
  [0, 1],
  [3, 0],
  [12, 0],
]);
const PARITY_FIELD = 15;
const NUMBER_FIELDS = [1, 2, 4, 5, 6, 7, 8, 9, 10, 11, 13, 14];

/** The sixteen fields of a number from 0 to 4095, 1 for white. */
export function fieldsOf(number) {
  const fields = new Array(16).fill(0);
  for (const [field, value] of FIXED) fields[field] = value;
  let ones = 0;
  NUMBER_FIELDS.forEach((field, place) => {
    const bit = (number >> (NUMBER_FIELDS.length - 1 - place)) & 1;
    fields[field] = bit;
    ones += bit;
  });
  fields[PARITY_FIELD] = ones & 1;
  return fields;
}

/**
 * Reads the number back from a picture.
 *
 * @param {number} width of the picture in pixels
 * @param {number} height of the picture in pixels
 * @param {(x: number, y: number) => number} lightAt brightness of a pixel, 0 to 255
 * @returns {number | null} null when the picture carries no valid number: wrong orientation, wrong parity, or fields
 *   that are neither black nor white
 */
export function readNumber(width, height, lightAt) {
  const fields = [];
  for (let field = 0; field < 16; field += 1) {
    const light = fieldLight(width, height, lightAt, field);
    if (light > 90 && light < 165) return null;
    fields.push(light >= 165 ? 1 : 0);
  }
  for (const [field, value] of FIXED) if (fields[field] !== value) return null;
  const number = NUMBER_FIELDS.reduce((sum, field) => sum * 2 + fields[field], 0);
  return fieldsOf(number)[PARITY_FIELD] === fields[PARITY_FIELD] ? number : null;
}

/** Mean brightness of a field without its outer fifth, where compression smears. */
function fieldLight(width, height, lightAt, field) {
  const left = ((field % 4) + 0.2) * (width / 4);
  const top = (Math.floor(field / 4) + 0.2) * (height / 4);
  let sum = 0;
  let count = 0;
  for (let j = 0; j < 8; j += 1) {
    for (let i = 0; i < 8; i += 1) {
      const x = Math.floor(left + ((i + 0.5) / 8) * 0.6 * (width / 4));
      const y = Math.floor(top + ((j + 0.5) / 8) * 0.6 * (height / 4));
      sum += lightAt(x, y);
      count += 1;
    }
  }
  return sum / count;
}
