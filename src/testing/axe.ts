import axe from 'axe-core';
import { expect } from 'vitest';

/** No violation that can be told without layout and colours, which jsdom does not have. */
export async function expectAccessible(container: Element = document.body): Promise<void> {
  const { violations } = await axe.run(container, {
    rules: { 'color-contrast': { enabled: false }, region: { enabled: false } },
  });
  expect(violations.map(({ id, nodes }) => `${id}: ${nodes.map((node) => node.html).join(' ')}`)).toEqual([]);
}
