import { readFileSync } from 'node:fs';
import { describe, expect, it } from '@jest/globals';

/** Contrast as WCAG 2.2 defines it. Source: https://www.w3.org/TR/WCAG22/#dfn-contrast-ratio and #dfn-relative-luminance */
function contrast(first: string, second: string): number {
  const [low = 0, high = 0] = [luminance(first), luminance(second)].sort((a, b) => a - b);
  return (high + 0.05) / (low + 0.05);
}

function luminance(hex: string): number {
  const [red = 0, green = 0, blue = 0] = [1, 3, 5].map((at) => {
    const channel = parseInt(hex.slice(at, at + 2), 16) / 255;
    return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

type Scheme = 'light' | 'dark';
type Palette = Readonly<Record<string, Readonly<Record<Scheme, string>>>>;

function paletteOf(rules: string): Palette {
  const lines = [...rules.matchAll(/--kb-([\w-]+): light-dark\((#[0-9a-f]{6}), (#[0-9a-f]{6})\)/g)];
  return Object.fromEntries(lines.map(([, name = '', light = '', dark = '']) => [name, { light, dark }]));
}

const [officeRules = '', tabletRules = ''] = readFileSync('web/ui/src/styles/_tokens.scss', 'utf8').split('html.kb-tablet');
const office = paletteOf(officeRules);
const tablet = { ...office, ...paletteOf(tabletRules) };

/** Every pair in which words are set: colour, then what it stands on. */
const words: readonly (readonly [string, string])[] = [
  ['ink', 'ground'],
  ['ink', 'ground-2'],
  ['ink', 'pigment-2'],
  ['ink', 'stop-2'],
  ['ink', 'caution-2'],
  ['ink', 'done-2'],
  ['ink-2', 'ground'],
  ['ink-2', 'ground-2'],
  ['pigment', 'ground'],
  ['pigment', 'ground-2'],
  ['stop', 'ground'],
  ['stop', 'ground-2'],
  ['stop', 'stop-2'],
  ['caution', 'ground'],
  ['caution', 'ground-2'],
  ['caution', 'caution-2'],
  ['done', 'ground'],
  ['done', 'ground-2'],
  ['done', 'done-2'],
  ['on-pigment', 'pigment'],
  ['on-stop', 'stop'],
];
/** Shapes that mean something without words beside them. */
const shapes: readonly (readonly [string, string])[] = [
  ['ink-2', 'ground'],
  ['pigment', 'ground'],
  ['pigment', 'pigment-2'],
  ['brass', 'ground'],
  ['stop', 'ground-2'],
];
const schemes: readonly Scheme[] = ['light', 'dark'];

function colour(palette: Palette, name: string, scheme: Scheme): string {
  const found = palette[name];
  if (!found) throw new Error(`no colour ${name} in _tokens.scss`);
  return found[scheme];
}

describe('contrast of the palette', () => {
  it('computes black on white as 21, the largest ratio there is (WCAG 2.2, contrast ratio, note 1)', () => {
    expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 5);
  });

  it.each(schemes.flatMap((scheme) => words.map((pair) => [scheme, ...pair] as const)))('office, %s: words in %s on %s reach AA, 4.5 (WCAG 2.2, 1.4.3)', (scheme, ink, ground) => {
    expect(contrast(colour(office, ink, scheme), colour(office, ground, scheme))).toBeGreaterThanOrEqual(4.5);
  });

  it.each(schemes.flatMap((scheme) => words.map((pair) => [scheme, ...pair] as const)))('tablet, %s: words in %s on %s reach AAA, 7 (WCAG 2.2, 1.4.6)', (scheme, ink, ground) => {
    expect(contrast(colour(tablet, ink, scheme), colour(tablet, ground, scheme))).toBeGreaterThanOrEqual(7);
  });

  it.each(schemes.flatMap((scheme) => shapes.map((pair) => [scheme, ...pair] as const)))('%s: shapes in %s on %s reach 3 (WCAG 2.2, 1.4.11)', (scheme, ink, ground) => {
    expect(contrast(colour(office, ink, scheme), colour(office, ground, scheme))).toBeGreaterThanOrEqual(3);
  });
});
