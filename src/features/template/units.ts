import type { DimensionName } from '@/engine/quantity';

/** Units that a field offers beside the one it shows. */
const OFFERED: Partial<Record<DimensionName, readonly string[]>> = {
  length: ['m', 'mm', 'ft-in', 'in'],
  force: ['kN', 'N', 'kip', 'lbf'],
  line_load: ['kN/m', 'N/m', 'kip/ft', 'lbf/ft'],
  moment: ['kNm', 'kip-ft'],
  bending_stiffness: ['kNm2', 'kip-in2'],
  spring: ['kN/m', 'kip/in'],
  rotational_spring: ['kNm/rad', 'kip-in/rad'],
  rotation: ['mrad', 'deg'],
  curvature: ['1/m', '1/in'],
  temperature: ['C', 'F'],
};

export const unitsOffered = (dimension: DimensionName, shown: string): readonly string[] => {
  const offered = OFFERED[dimension] ?? [shown];
  return offered.includes(shown) ? offered : [shown, ...offered];
};
