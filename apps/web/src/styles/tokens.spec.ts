import { readFileSync } from 'node:fs';
import { join } from 'node:path';

const text = readFileSync(join(__dirname, '_tokens.scss'), 'utf8');
const pairs = [...text.matchAll(/([a-z-]+): \(\s*(#[0-9a-f]{6}),\s*(#[0-9a-f]{6})/g)];
const themes = [2, 3].map((group) => new Map(pairs.map((match) => [match[1]!, match[group]!])));

/** Relative luminance and contrast as WCAG 2.2 defines them. */
function luminance(colour: string): number {
  const [red, green, blue] = [1, 3, 5].map((at) => {
    const channel = parseInt(colour.slice(at, at + 2), 16) / 255;
    return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;
  }) as [number, number, number];
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

function contrast(theme: ReadonlyMap<string, string>, one: string, other: string): number {
  const [a, b] = [luminance(theme.get(one)!), luminance(theme.get(other)!)];
  return (Math.max(a, b) + 0.05) / (Math.min(a, b) + 0.05);
}

const grounds = ['ground', 'surface', 'hover', 'chosen'];
const words = ['ink', 'slate', 'copper', 'verdigris-word', 'oxide', 'ochre-word'];

describe.each([
  ['vellum', themes[0]!],
  ['ink', themes[1]!],
])('the palette on %s', (_name, theme) => {
  it('is read whole', () => {
    expect(theme.size).toBeGreaterThanOrEqual(16);
  });

  it.each(words.flatMap((word) => grounds.map((ground) => [word, ground] as const)))(
    'lets words in %s be read on %s',
    (word, ground) => expect(contrast(theme, word, ground)).toBeGreaterThanOrEqual(4.5),
  );

  it.each([
    ['on-copper', 'copper'],
    ['on-oxide', 'oxide'],
  ])('lets %s be read on %s', (word, ground) => {
    expect(contrast(theme, word, ground)).toBeGreaterThanOrEqual(4.5);
  });

  it.each(['verdigris', 'ochre', 'outline'])('lets %s be seen as a mark or an outline', (mark) => {
    expect(contrast(theme, mark, 'ground')).toBeGreaterThanOrEqual(3);
    expect(contrast(theme, mark, 'surface')).toBeGreaterThanOrEqual(3);
  });
});
