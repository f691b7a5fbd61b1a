import { describe, expect, it } from 'vitest';
import { glassware, levelOf, type GlassId } from '../../../src/bench/glassware';
import { luminance, paint } from '../../../src/islands/bench/glass/light';
import { innerPath, radiusAt } from '../../../src/islands/bench/glass/shape';
import { shapeOf } from '../../../src/islands/bench/glass/shapeOf';

const ids = Object.keys(glassware) as GlassId[];

/** WCAG contrast of two luminances. */
const contrast = (a: number, b: number): number => (Math.max(a, b) + 0.05) / (Math.min(a, b) + 0.05);

describe('glass', () => {
  it.each(ids)('%s: a volume stands at its own etched mark', (id) => {
    const glass = glassware[id];
    const shape = shapeOf(id);
    for (const text of shape.texts) {
      const mL = Number(text.text);
      if (Number.isNaN(mL)) continue;
      const volume = glass.scaleFromTop ? glass.nominal_mL - mL : mL;
      expect(text.h).toBeCloseTo(levelOf(glass, volume) * 10 * shape.squash, 6);
      expect(shape.marks.some((mark) => Math.abs(mark.h - text.h) < 1e-9)).toBe(true);
    }
  });

  it.each(ids)('%s: marks and inner numbers stay inside the glass, numbers apart', (id) => {
    const shape = shapeOf(id);
    const top = shape.profile[shape.profile.length - 1]!.h;
    for (const mark of shape.marks) {
      expect(mark.h).toBeLessThan(top);
      expect(mark.to).toBeLessThanOrEqual(radiusAt(shape.profile, mark.h) + 1e-9);
    }
    const heights = shape.texts.map((text) => text.h).sort((a, b) => a - b);
    for (let i = 1; i < heights.length; i += 1) expect(heights[i]! - heights[i - 1]!).toBeGreaterThan(3);
  });

  it.each(ids)('%s: its outline is a closed path of numbers', (id) => {
    expect(innerPath(shapeOf(id).profile, shapeOf(id).rounding)).toMatch(/^M [-\d. ]+( [LQ] [-\d. ]+)+ Z$/);
  });

  it('is one object for one kind of glass, so that still vessels are not drawn again', () => {
    expect(shapeOf('beaker-100')).toBe(shapeOf('beaker-100'));
  });
});

describe('etched marks', () => {
  it('keep 3:1 over any liquid, white or etch', () => {
    const etch = luminance([0x3d, 0x41, 0x46]);
    for (let r = 0; r <= 255; r += 15) {
      for (let g = 0; g <= 255; g += 15) {
        for (let b = 0; b <= 255; b += 15) {
          const hex = `#${[r, g, b].map((c) => c.toString(16).padStart(2, '0')).join('')}`;
          const { dark } = paint({ hex, words: 'some colour' });
          expect(contrast(luminance([r, g, b]), dark ? 1 : etch)).toBeGreaterThanOrEqual(3);
        }
      }
    }
  });

  it('stand dark over a colourless liquid, which is drawn in its own grey', () => {
    expect(paint({ hex: '#fdfdfe', words: 'colourless' })).toEqual({
      fill: '#eaeaea',
      surface: '#9a9da1',
      dark: false,
    });
  });
});
