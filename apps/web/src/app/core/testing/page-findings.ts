import axe from 'axe-core';

/**
 * What axe finds in a rendered part, as "rule: where" lines; empty is clean. Rules about the whole document
 * (one main, its title) are left to the tests of the whole product.
 */
export async function pageFindings(root: Element): Promise<string[]> {
  const outcome = await axe.run(root, {
    runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'],
    rules: { region: { enabled: false }, 'page-has-heading-one': { enabled: false } },
  });
  return outcome.violations.flatMap((found) =>
    found.nodes.map((node) => `${found.id}: ${node.target.join(' ')}`),
  );
}
