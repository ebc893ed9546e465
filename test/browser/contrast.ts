/**
 * Contrast of text and its ground, measured in the page from the colours as computed.
 * Source: WCAG 2.2, "relative luminance" and "contrast ratio".
 *
 * Not handled: grounds that are pictures or partly see-through.
 */
import type { Page } from 'playwright-core';

interface TextContrast {
  readonly text: string;
  readonly ratio: number;
}

/** The contrast of every visible text in elements that match the selector; disabled ones are exempt. */
export function textContrasts(page: Page, selector: string): Promise<TextContrast[]> {
  return page.evaluate((elements) => {
    const canvas = document.createElement('canvas').getContext('2d', { willReadFrequently: true });
    if (canvas === null) throw new Error('no canvas');
    // Painting a colour resolves any notation and system colours.
    const pixel = (color: string) => {
      canvas.clearRect(0, 0, 1, 1);
      canvas.fillStyle = color;
      canvas.fillRect(0, 0, 1, 1);
      return [...canvas.getImageData(0, 0, 1, 1).data];
    };
    const luminance = (color: string) => {
      const [r = 0, g = 0, b = 0] = pixel(color).map((c) => {
        const s = c / 255;
        return s <= 0.04045 ? s / 12.92 : ((s + 0.055) / 1.055) ** 2.4;
      });
      return 0.2126 * r + 0.7152 * g + 0.0722 * b;
    };
    const groundOf = (element: Element): string => {
      const { backgroundColor } = getComputedStyle(element);
      if ((pixel(backgroundColor)[3] ?? 0) === 255) return backgroundColor;
      return element.parentElement ? groundOf(element.parentElement) : 'Canvas';
    };
    const showsText = (element: Element) =>
      element.getClientRects().length > 0 &&
      !element.matches(':disabled') &&
      [...element.childNodes].some(
        (node) => node.nodeType === Node.TEXT_NODE && node.textContent?.trim() !== '',
      );
    return [...document.querySelectorAll(elements)].filter(showsText).map((element) => {
      const text = luminance(getComputedStyle(element).color);
      const ground = luminance(groundOf(element));
      const [dark, light] = [Math.min(text, ground), Math.max(text, ground)];
      return { text: element.textContent ?? '', ratio: (light + 0.05) / (dark + 0.05) };
    });
  }, selector);
}
