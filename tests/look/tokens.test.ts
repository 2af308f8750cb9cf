import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

const css = readFileSync(new URL('../../src/styles/tokens.css', import.meta.url), 'utf8');

/** The colours declared in the first block after a selector. */
function tokensAfter(selector: string): Record<string, string> {
  const start = css.indexOf('{', css.indexOf(selector) + selector.length - 1);
  const block = css.slice(start, css.indexOf('}', start));
  return Object.fromEntries(
    [...block.matchAll(/--([\w-]+):\s*(#[0-9a-f]{6})/g)].map(([, name, value]) => [name, value]),
  );
}

/** Contrast ratio of two colours as WCAG 2.2 defines it. */
function contrast(one: string, other: string): number {
  const [light, dark] = [luminance(one), luminance(other)].sort((a, b) => b - a) as [number, number];
  return (light + 0.05) / (dark + 0.05);
}
function luminance(hex: string): number {
  const [red, green, blue] = [1, 3, 5].map((at) => {
    const channel = parseInt(hex.slice(at, at + 2), 16) / 255;
    return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;
  }) as [number, number, number];
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

const light = tokensAfter(':root {');
const dark = tokensAfter(":root[data-theme='dark'] {");

describe('the tokens', () => {
  it('say the same for a dark system as for a dark choice', () => {
    expect(tokensAfter(":root:not([data-theme='light']) {")).toEqual(dark);
  });

  it('name the same colours in both themes', () => {
    expect(Object.keys(dark).sort()).toEqual(Object.keys(light).sort());
  });

  it.each([
    ['light', light],
    ['dark', dark],
  ])('give text at least 4.5 : 1 in the %s theme, and ink 7 : 1', (_, theme) => {
    const pairs = ['paper', 'board'].flatMap((ground) =>
      ['ink', 'soft', 'plum', 'mint', 'saffron', 'brick'].map((text) => [text, ground] as const),
    );
    const onTints = ['plum', 'mint', 'saffron', 'brick'].flatMap((hue) => [
      [hue, `${hue}-tint`] as const,
      ['ink', `${hue}-tint`] as const,
    ]);
    const poor = [...pairs, ...onTints, ['paper', 'plum'] as const, ['paper', 'ink'] as const].filter(
      ([text, ground]) => contrast(theme[text]!, theme[ground]!) < (text === 'ink' ? 7 : 4.5),
    );
    expect(poor).toEqual([]);
  });

  it('contrast is 21 : 1 between black and white', () => {
    expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 9);
  });
});
