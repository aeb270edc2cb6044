import type { Page } from 'playwright-core';

/**
 * What does not fit the window: the page itself where it scrolls sideways, and controls and headings that reach beyond
 * its edges or whose words are cut. What lies in a box that scrolls by itself is left out: it can be reached.
 */
export function overflow(page: Page): Promise<string[]> {
  return page.evaluate(() => {
    const root = document.documentElement;
    const found: string[] = [];
    if (root.scrollWidth > root.clientWidth) found.push(`the page is ${root.scrollWidth} wide`);
    const scrolls = (element: Element): boolean => {
      for (let up = element.parentElement; up && up !== document.body; up = up.parentElement) {
        const style = getComputedStyle(up);
        if (/auto|scroll/.test(style.overflowX) && up.scrollWidth > up.clientWidth) return true;
        if (style.clipPath !== 'none') return true;
      }
      return false;
    };
    for (const element of document.querySelectorAll<HTMLElement>(
      'h1, h2, h3, button, a, input, select, label, dt, dd',
    )) {
      const box = element.getBoundingClientRect();
      // What lies in a closed disclosure is laid out by no one.
      const isHidden =
        !element.checkVisibility() ||
        box.width < 2 ||
        getComputedStyle(element).clipPath !== 'none' ||
        element.matches('.skip-link');
      if (isHidden || scrolls(element)) continue;
      const name = `${element.tagName.toLowerCase()} “${(element.textContent || element.id).trim().slice(0, 40)}”`;
      if (box.right > root.clientWidth + 1 || box.left < -1)
        found.push(`${name} reaches from ${box.left} to ${box.right}`);
      const isBlock = getComputedStyle(element).display !== 'inline' && !/^(SELECT|INPUT)$/.test(element.tagName);
      if (isBlock && element.scrollWidth > element.clientWidth + 2) found.push(`${name} is cut`);
    }
    return found;
  });
}
