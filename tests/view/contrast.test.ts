import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

/** Contrast as WCAG 2.2 defines it, from the relative luminance of sRGB colours. */
const luminance = (hex: string): number => {
  const [r, g, b] = [1, 3, 5].map((at) => {
    const part = parseInt(hex.slice(at, at + 2), 16) / 255;
    return part <= 0.04045 ? part / 12.92 : ((part + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * r! + 0.7152 * g! + 0.0722 * b!;
};
const contrast = (one: string, other: string): number => {
  const [dark, light] = [luminance(one), luminance(other)].sort((left, right) => left - right);
  return (light! + 0.05) / (dark! + 0.05);
};

const css = readFileSync(new URL('../../src/styles/theme.css', import.meta.url), 'utf8');
const tokensOf = (selector: string): Record<string, string> => {
  const from = css.indexOf(`${selector} {`);
  const block = css.slice(from, css.indexOf('}', from));
  return Object.fromEntries(
    [...block.matchAll(/--([a-z0-9-]+): (#[0-9a-f]{6})/g)].map((match) => [match[1], match[2]]),
  );
};
const themes = { desk: tokensOf(':root'), 'control room': tokensOf(":root[data-theme='dark']") };

describe.each(Object.entries(themes))('the %s theme', (_name, tokens) => {
  it.each(
    ['ink', 'ink-2', 'rising', 'near', 'over', 'blind', 'accent'].flatMap((text) =>
      ['ground', 'panel'].map((behind) => [text, behind] as const),
    ),
  )('writes %s on %s at 4.5 to 1 or better', (text, behind) =>
    expect(contrast(tokens[text]!, tokens[behind]!)).toBeGreaterThanOrEqual(4.5),
  );

  it('writes on the filled over at 4.5 to 1 or better', () =>
    expect(contrast(tokens['on-over']!, tokens['over']!)).toBeGreaterThanOrEqual(4.5));

  it.each([
    ['rule', 'ground'],
    ['rule', 'panel'],
    ['rising', 'lane'],
    ['near', 'lane'],
    ['over', 'lane'],
    ['near', 'band'],
    ['rising', 'band'],
    ['over', 'band'],
    ['ink', 'band'],
  ])('draws %s against %s at 3 to 1 or better', (mark, behind) =>
    expect(contrast(tokens[mark]!, tokens[behind]!)).toBeGreaterThanOrEqual(3),
  );
});

it('the system’s preference for dark gives the same tokens as choosing the control room', () => {
  expect(tokensOf(':root:not([data-theme])')).toEqual(themes['control room']);
});
