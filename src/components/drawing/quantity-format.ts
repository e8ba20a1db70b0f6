import {
  FOOT,
  formatFeetInches,
  formatNumber,
  INCH,
  type Purpose as QuantityPurpose,
  toUnit,
  UNIT_SYSTEMS,
  type UnitSystemName,
  unitText,
} from '@/engine/quantity/index';
import type { DrawingFormat, Purpose } from './format';

const PURPOSE: Record<Purpose, QuantityPurpose> = {
  length: 'position',
  force: 'reaction',
  lineLoad: 'line_load',
  moment: 'moment',
  slope: 'slope',
  deflection: 'deflection',
  curvature: 'curvature',
  spring: 'spring',
  rotationalSpring: 'rotational_spring',
  sectionSize: 'section_size',
};

const STATION = {
  metric: { unit: 'm', step: 1, nudge: 0.05, leap: 0.5, snap: 0.005 },
  us: { unit: 'ft', step: FOOT, nudge: 2 * INCH, leap: 2 * FOOT, snap: INCH / 4 },
};

const SCALE_BAR = { metric: { unit: 'mm', metres: 0.001 }, us: { unit: 'in', metres: INCH } };

function formatIn(system: UnitSystemName): DrawingFormat {
  return {
    value(purpose, si) {
      const display = UNIT_SYSTEMS[system][PURPOSE[purpose]];
      return display.unit === 'ft-in'
        ? formatFeetInches(si)
        : formatNumber(toUnit(si, display.unit), display);
    },
    unit(purpose) {
      const { unit } = UNIT_SYSTEMS[system][PURPOSE[purpose]];
      return unit === 'ft-in' ? '' : unitText(unit);
    },
    station: STATION[system],
    scaleBar: SCALE_BAR[system],
  };
}

/** How drawings write figures in each of the practice's unit systems. */
export const DRAWING_FORMATS: Record<UnitSystemName, DrawingFormat> = {
  metric: formatIn('metric'),
  us: formatIn('us'),
};
