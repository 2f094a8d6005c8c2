import axe from 'axe-core';
import { expect, type Page } from '@playwright/test';

/** axe finds nothing on the page as it is (WCAG 2.2 A and AA and axe's best practices). */
export async function expectAccessible(page: Page, what: string): Promise<void> {
  // A colour on its way to another is not what people read: transitions come to their end first.
  await page.evaluate(async () => {
    await new Promise((drawn) => requestAnimationFrame(() => requestAnimationFrame(drawn)));
    const turning = document.getAnimations().filter((each) => each instanceof CSSTransition);
    await Promise.allSettled(turning.map((each) => each.finished));
  });
  await page.evaluate(axe.source);
  const found = await page.evaluate(async () => {
    const runner = (globalThis as unknown as { axe: typeof axe }).axe;
    const { violations } = await runner.run();
    return violations.map(
      ({ id, help, nodes }) =>
        `${id}: ${help}: ${nodes
          .map(({ html }) => html.slice(0, 160))
          .slice(0, 3)
          .join(' | ')}`,
    );
  });
  expect(found, what).toEqual([]);
}
