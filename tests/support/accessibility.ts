import axe from 'axe-core';

/**
 * What an automatic reader finds wrong in an element, one line each. Contrast needs a real layout and is
 * measured in the browser.
 */
export async function accessibilityProblems(element: Element): Promise<string[]> {
  const { violations } = await axe.run(element, {
    rules: { 'color-contrast': { enabled: false }, region: { enabled: false } },
  });
  return violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html).join(' ')}`);
}
