import type { Mark } from '@stillstroke/contract/marks';
import type { StageColours } from '../../desk/stage/stage-colours';
import { composeFrames, composeStill, encodeStill } from './compose-still';
import { planStill } from './still-layout';

const colours: StageColours = {
  arm: { left: '#ffb733', right: '#4ba3db' },
  casing: '#10222b',
  plumb: '#ffffff',
};

function plain(width: number, height: number, colour = '#000000'): HTMLCanvasElement {
  const canvas = document.createElement('canvas');
  canvas.width = width;
  canvas.height = height;
  const context = canvas.getContext('2d');
  if (context) {
    context.fillStyle = colour;
    context.fillRect(0, 0, width, height);
  }
  return canvas;
}

const mark = (more: Partial<Mark> = {}): Mark => ({
  arm: 'right',
  frame: 7,
  shoulder: { x: 500.5, y: 200.5 },
  elbow: { x: 700.5, y: 300.5 },
  wrist: { x: 760.5, y: 520.5 },
  angles: { forearmDeg: 15, upperArmDeg: 60, elbowDeg: 140, elbowDropDeg: 4 },
  uncertaintyDeg: { forearmDeg: 1, upperArmDeg: 1, elbowDeg: 1, elbowDropDeg: 1 },
  plumbAssumed: false,
  version: 1,
  updatedAt: '2026-11-28T10:00:00.000Z',
  ...more,
});

type Colour = readonly [number, number, number];
interface Spot {
  readonly x: number;
  readonly y: number;
}
const BLUE: Colour = [0x4b, 0xa3, 0xdb];
const YELLOW: Colour = [0xff, 0xe1, 0x4d];

/** Middles of all pixels of a colour in a square round a point, as seen from it. */
function spots(canvas: HTMLCanvasElement, round: Spot, reach: number, colour: Colour): Spot[] {
  const left = Math.round(round.x - reach);
  const top = Math.round(round.y - reach);
  const side = reach * 2;
  const data = canvas.getContext('2d')?.getImageData(left, top, side, side).data ?? new Uint8ClampedArray();
  const found: Spot[] = [];
  for (let at = 0; at < data.length; at += 4) {
    if (colour.some((part, n) => Math.abs((data[at + n] ?? 0) - part) > 24)) continue;
    const [column, row] = [(at / 4) % side, Math.floor(at / 4 / side)];
    found.push({ x: left + column + 0.5 - round.x, y: top + row + 0.5 - round.y });
  }
  return found;
}

/**
 * How far the wrist's joint is drawn from where it is marked, along the forearm and across it. The joint is a disc of
 * the arm's colour at the end of the arm's line: its far rim and its middle line say where it is.
 */
function wristOff(still: HTMLCanvasElement, { elbow, wrist }: Mark): { along: number; across: number } {
  const unit = still.height / 540;
  const length = Math.hypot(wrist.x - elbow.x, wrist.y - elbow.y);
  const forearm = { x: (wrist.x - elbow.x) / length, y: (wrist.y - elbow.y) / length };
  const seen = spots(still, wrist, Math.round(12 * unit), BLUE);
  const across = seen.map(({ x, y }) => x * forearm.y - y * forearm.x);
  const along = seen.map(({ x, y }) => x * forearm.x + y * forearm.y);
  // Radius of the joint's disc and half its rim, in units of the line.
  const rim = (6 + 1) * unit;
  return {
    along: Math.max(...along) - rim,
    across: (Math.max(...across) + Math.min(...across)) / 2,
  };
}

describe('a still', () => {
  it('shows a wrist where it is marked, within a pixel, whatever the size of the film', () => {
    for (const [width, height, by] of [
      [1280, 720, 1],
      [1920, 1080, 1.5],
      [3840, 2160, 3],
    ] as const) {
      const at = (x: number, y: number) => ({ x: x * by, y: y * by });
      const scaled = mark({ shoulder: at(500, 200), elbow: at(700, 300), wrist: at(760, 520) });
      const frame = { canvas: plain(width, height), marks: [scaled], rollDeg: 0, label: null };
      const still = composeFrames([frame], true, colours);
      expect([still.width, still.height]).toEqual([width, height]);
      const off = wristOff(still, scaled);
      expect(Math.abs(off.along), `along the forearm at ${width}`).toBeLessThan(1);
      expect(Math.abs(off.across), `across it at ${width}`).toBeLessThan(1);
      const bare = composeFrames([frame], false, colours);
      expect(spots(bare, scaled.wrist, 20, BLUE)).toEqual([]);
    }
  });

  it('has pairs of one height side by side, and no more pixels than are taken', () => {
    const pair = planStill([
      { width: 1920, height: 1080 },
      { width: 640, height: 480 },
    ]);
    expect(pair).toMatchObject({ width: 1920 + 13 + 1440, height: 1080 });
    expect(pair.places[1]).toMatchObject({ left: 1933, scale: 1080 / 480 });
    const huge = planStill([
      { width: 8192, height: 8192 },
      { width: 8192, height: 8192 },
    ]);
    expect(huge.width * huge.height).toBeLessThanOrEqual(2 * 4096 * 2304);
    const still = composeFrames(
      [
        { canvas: plain(200, 100, '#ff0000'), marks: [], rollDeg: 0, label: 'Left' },
        { canvas: plain(200, 100, '#0000ff'), marks: [], rollDeg: 0, label: 'Right' },
      ],
      true,
      colours,
    );
    const pixel = (x: number) => [...(still.getContext('2d')?.getImageData(x, 90, 1, 1).data ?? [])];
    expect([pixel(100), pixel(300)]).toEqual([
      [255, 0, 0, 255],
      [0, 0, 255, 255],
    ]);
  });

  it('has on it what was drawn by hand, its arrow ending where it points', async () => {
    const frames = plain(400, 300);
    const arrow = {
      kind: 'arrow',
      colour: 'yellow',
      from: { x: 40, y: 40 },
      to: { x: 200, y: 150 },
    } as const;
    const words = { kind: 'words', colour: 'white', at: { x: 40, y: 200 }, words: '<b>Keep it</b>' } as const;
    const angle = {
      kind: 'angle',
      colour: 'green',
      corner: { x: 300, y: 200 },
      from: { x: 360, y: 200 },
      to: { x: 300, y: 120 },
    } as const;
    const still = composeStill(frames, [arrow, words, angle]);
    expect(spots(still, { x: 190, y: 143 }, 8, YELLOW).length).toBeGreaterThan(30);
    expect(spots(still, { x: 212, y: 158 }, 8, YELLOW)).toEqual([]);
    expect(spots(still, { x: 60, y: 212 }, 20, [255, 255, 255]).length).toBeGreaterThan(20);
    expect(spots(frames, { x: 190, y: 143 }, 8, YELLOW)).toEqual([]);
    const blob = await encodeStill(still);
    expect([blob.type, blob.size > 1000]).toEqual(['image/jpeg', true]);
  });
});
