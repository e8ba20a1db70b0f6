import { expect, test } from 'vitest';
import { forceMethod, solveBeam } from '@/engine/beam/index';
import { readBeam } from '@/engine/model/index';
import { forceMethodPictures } from './force-method-pictures';
import { DRAWING_FORMATS } from './quantity-format';

const reading = readBeam({
  length: 8,
  ei: 2e7,
  supports: [
    { at: 0, kind: 'fixed' },
    { at: 8, kind: 'roller' },
  ],
  loads: [{ kind: 'point', at: 3, p: 1000 }],
});
if (!reading.ok) throw new Error('refused');
const beam = reading.value;

test.each([
  ['metric', ['1 kN', '1 kNm']],
  ['us', ['1 kip', '1 kip-ft']],
] as const)('unit loads of a %s job are in its own units', (system, labels) => {
  const redundants = [
    { support: 1, component: 'vertical' },
    { support: 0, component: 'rotation' },
  ] as const;
  const marks = redundants.map((redundant) => {
    const parts = forceMethod(beam, [redundant]);
    const { units } = forceMethodPictures(beam, parts, solveBeam(beam), DRAWING_FORMATS[system]);
    return units[0]?.mark;
  });
  expect(marks.map((mark) => mark?.label)).toEqual(labels);
});
