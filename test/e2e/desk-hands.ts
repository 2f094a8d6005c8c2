import { expect, type Locator, type Page } from '@playwright/test';
import { truth, type Arm, type Point } from './lane-four';

/** Working on the Desk as a person does: keys, presses on the picture, the panels beside it. */
export class DeskHands {
  readonly stage: Locator;

  constructor(private readonly page: Page) {
    this.stage = page.locator('st-stage');
  }

  async opened(): Promise<void> {
    await expect(this.stage.locator('.caption strong')).toContainText('Frame', { timeout: 60_000 });
  }

  async frame(): Promise<number> {
    const text = await this.stage.locator('.caption strong').innerText();
    return Number(/Frame (\d+)/.exec(text)?.[1]);
  }

  /** By the arrow keys, as anybody would. */
  async goTo(frame: number): Promise<void> {
    await this.page.keyboard.press('Home');
    for (let tens = Math.floor(frame / 10); tens > 0; tens--)
      await this.page.keyboard.press('Shift+ArrowRight');
    for (let ones = frame % 10; ones > 0; ones--) await this.page.keyboard.press('ArrowRight');
    await this.shows(frame);
  }

  async shows(frame: number): Promise<void> {
    await expect(this.stage.locator('.caption strong')).toHaveText(`Frame ${frame}`, { timeout: 30_000 });
  }

  async leaves(frame: number): Promise<void> {
    await expect(this.stage.locator('.caption strong')).not.toHaveText(`Frame ${frame}`);
  }

  async choose(arm: Arm): Promise<void> {
    await this.page.keyboard.press(arm === 'left' ? '1' : '2');
  }

  /** Where a point of the picture lies on the page while the whole picture is shown. */
  async place(point: Point): Promise<Point> {
    const box = await this.stage.locator('.pointers').boundingBox();
    if (!box) throw new Error('no stage');
    const scale = Math.min(box.width / truth.width, box.height / truth.height);
    return {
      x: box.x + (box.width - truth.width * scale) / 2 + point.x * scale,
      y: box.y + (box.height - truth.height * scale) / 2 + point.y * scale,
    };
  }

  async press(point: Point): Promise<void> {
    const at = await this.place(point);
    await this.page.mouse.move(at.x, at.y);
    await this.page.mouse.down();
    await this.page.mouse.up();
  }

  async drag(from: Point, to: Point): Promise<void> {
    const [start, end] = [await this.place(from), await this.place(to)];
    await this.page.mouse.move(start.x, start.y);
    await this.page.mouse.down();
    await this.page.mouse.move((start.x + end.x) / 2, (start.y + end.y) / 2, { steps: 3 });
    await this.page.mouse.move(end.x, end.y, { steps: 3 });
    await this.page.mouse.up();
  }

  async openPanel(name: 'Readings' | 'Strokes' | 'Marks' | 'Set-up'): Promise<void> {
    await this.page.getByRole('tab', { name }).click();
  }

  /** All that was done is acknowledged. The words follow a change with the next drawing of the page, hence the two frames. */
  async saved(): Promise<void> {
    await this.page.evaluate(
      () => new Promise((drawn) => requestAnimationFrame(() => requestAnimationFrame(drawn))),
    );
    await expect(this.page.locator('st-desk-bar .save')).toContainText(/saved/i);
  }
}
