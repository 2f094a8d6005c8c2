import { DrawingList, pointsOf, sayDrawing, withPoint } from './drawing-list';

const size = { width: 600, height: 300 };

describe('what is drawn on a still', () => {
  it('is undone and redone step by step, a drag being one step', () => {
    const list = new DrawingList();
    list.add('arrow', size);
    list.drawn('line', { x: 10, y: 20 }, { x: 30, y: 40 });
    list.hold();
    for (const x of [31, 35, 40]) {
      const line = list.drawings()[1];
      if (line) list.change(1, withPoint(line, 1, { x, y: 40 }, size));
    }
    list.release();
    expect(list.drawings()[1]).toMatchObject({ to: { x: 40, y: 40 } });
    list.undo();
    expect(list.drawings()[1]).toMatchObject({ to: { x: 30, y: 40 } });
    list.undo();
    expect(list.drawings()).toHaveLength(1);
    list.redo();
    list.redo();
    expect(list.drawings()[1]).toMatchObject({ to: { x: 40, y: 40 } });
    expect(list.canRedo()).toBe(false);
    list.undo();
    list.remove(0);
    expect(list.canRedo()).toBe(false);
    list.undo();
    expect(list.drawings()).toHaveLength(2);
  });

  it('stays inside the still and has words for those who do not see it', () => {
    const list = new DrawingList();
    list.drawn('angle', { x: 100, y: 100 }, { x: 200, y: 100 });
    const angle = list.drawings()[0];
    expect(angle && pointsOf(angle)).toEqual([
      { x: 100, y: 100 },
      { x: 200, y: 100 },
      { x: 100, y: 0 },
    ]);
    const moved = angle && withPoint(angle, 0, { x: -50, y: 999 }, size);
    expect(moved && sayDrawing(moved)).toBe('Angle at 0, 300');
    list.add('words', size);
    expect(list.drawings().map(sayDrawing)[1]).toBe('“Here” at 250, 175');
  });
});
