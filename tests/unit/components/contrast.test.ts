import { describe, expect, it } from 'vitest';
import { darkRoles, lightRoles, type Role } from '#components/theme/theme.ts';

function luminance(hex: string): number {
  const [red = 0, green = 0, blue = 0] = [1, 3, 5].map((at) => {
    const channel = parseInt(hex.slice(at, at + 2), 16) / 255;
    return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

function contrast(one: string, other: string): number {
  const [dark = 0, light = 0] = [luminance(one), luminance(other)].sort((a, b) => a - b);
  return (light + 0.05) / (dark + 0.05);
}

const grounds: Role[] = ['page', 'panel'];
const letters: Role[] = ['text', 'quiet', 'actionText', 'danger', 'good', 'waiting'];
const marks: Role[] = ['sold', 'heldHatch', 'freeEdge', 'edge', 'action'];
const schemes = { light: lightRoles, dark: darkRoles };

describe.each(Object.entries(schemes))('%s scheme', (_name, roles) => {
  it.each(letters.flatMap((letter) => grounds.map((ground) => [letter, ground] as const)))(
    'letters in %s on %s reach 4.5:1',
    (letter, ground) => {
      expect(contrast(roles[letter], roles[ground])).toBeGreaterThanOrEqual(4.5);
    },
  );

  it('letters on the action and on the rail fills reach 4.5:1', () => {
    expect(contrast(roles.onAction, roles.action)).toBeGreaterThanOrEqual(4.5);
    expect(contrast(roles.onAction, roles.sold)).toBeGreaterThanOrEqual(4.5);
    expect(contrast(roles.good, roles.free)).toBeGreaterThanOrEqual(4.5);
    expect(contrast(roles.text, roles.held)).toBeGreaterThanOrEqual(4.5);
  });

  it.each(marks)('the mark %s reaches 3:1 on the page', (mark) => {
    expect(contrast(roles[mark], roles.page)).toBeGreaterThanOrEqual(3);
  });

  it('sold, held and free stay apart from their neighbours', () => {
    expect(contrast(roles.sold, roles.free)).toBeGreaterThanOrEqual(2.5);
    expect(contrast(roles.freeEdge, roles.free)).toBeGreaterThanOrEqual(3);
  });
});

it('contrast, of black on white, is 21:1', () => {
  expect(contrast('#000000', '#FFFFFF')).toBeCloseTo(21, 5);
});
