import type {
  AngleDimensions,
  ChannelDimensions,
  IDimensions,
  OutlineDimensions,
  SectionDimensions,
  TaperedChannelDimensions,
  TaperedIDimensions,
  TeeDimensions,
  TubeDimensions,
} from './dimensions';
import { ringFaults } from './ring-faults';

type FlangedDimensions =
  | IDimensions
  | ChannelDimensions
  | TeeDimensions
  | TaperedIDimensions
  | TaperedChannelDimensions;

export type DimensionFault = { dimension: string; message: string };

const positive = (entries: readonly (readonly [string, number])[]): DimensionFault[] =>
  entries
    .filter(([, value]) => !(value > 0 && Number.isFinite(value))) // !(>) also catches NaN
    .map(([dimension]) => ({ dimension, message: `${dimension} must be more than 0` }));

function flangedFaults(d: FlangedDimensions): DimensionFault[] {
  const faults = positive([
    ['h', d.h],
    ['b', d.b],
    ['tw', d.tw],
    ['tf', d.tf],
  ]);
  if (!(d.r >= 0)) faults.push({ dimension: 'r', message: 'r must not be negative' });
  if (faults.length > 0) return faults;
  const flanges = d.shape === 'tee' ? 1 : 2;
  if (flanges * (d.tf + d.r) >= d.h)
    faults.push({ dimension: 'h', message: 'flanges and root radii fill the depth' });
  const roots = d.shape === 'channel' || d.shape === 'tapered_channel' ? 1 : 2;
  if (d.tw + roots * d.r > d.b) {
    faults.push({ dimension: 'b', message: 'web and root radii are wider than the flange' });
  }
  return 'slope' in d ? [...faults, ...taperFaults(d)] : faults;
}

const STEEPEST = 0.5; // of flanges that are still rolled: beyond it the radii no longer fit

function taperFaults(d: TaperedIDimensions | TaperedChannelDimensions): DimensionFault[] {
  const outstand = d.shape === 'tapered_i' ? (d.b - d.tw) / 2 : d.b - d.tw;
  const faults: DimensionFault[] = [];
  if (!(d.slope > 0 && d.slope <= STEEPEST))
    faults.push({ dimension: 'slope', message: 'slope must be more than 0 and at most 0.5' });
  if (!(d.at >= 0 && d.at <= outstand))
    faults.push({ dimension: 'at', message: 'tf must be measured on the outstanding flange' });
  if (!(d.toe >= 0)) faults.push({ dimension: 'toe', message: 'toe must not be negative' });
  if (faults.length > 0) return faults;
  if (d.tf - d.slope * d.at < d.toe)
    faults.push({ dimension: 'toe', message: 'the flange is thinner at its tip than the toe radius' });
  if (2 * (d.tf + d.slope * (outstand - d.at) + d.r) >= d.h)
    faults.push({ dimension: 'h', message: 'flanges and root radii fill the depth' });
  return faults;
}

function angleFaults(d: AngleDimensions): DimensionFault[] {
  const faults = positive([
    ['h', d.h],
    ['b', d.b],
    ['t', d.t],
  ]);
  for (const dimension of ['r', 'toe'] as const)
    if (!(d[dimension] >= 0)) faults.push({ dimension, message: `${dimension} must not be negative` });
  if (faults.length > 0) return faults;
  if (d.toe > d.t) faults.push({ dimension: 'toe', message: 'the toe radius is larger than the thickness' });
  if (d.t + d.r + d.toe > Math.min(d.h, d.b))
    faults.push({ dimension: 't', message: 'thickness and radii are more than the leg' });
  return faults;
}

function outlineFaults(d: OutlineDimensions): DimensionFault[] {
  const faults = positive([['t', d.t]]);
  for (const dimension of ['j', 'iw'] as const)
    if (!(d[dimension] >= 0)) faults.push({ dimension, message: `${dimension} must not be negative` });
  if (d.rings.length === 0 || d.rings.some((ring) => ring.length < 3))
    return [...faults, { dimension: 'rings', message: 'a ring needs three corners or more' }];
  if (d.parts && d.parts.reduce((sum, part) => sum + part.rings, 0) !== d.rings.length)
    return [...faults, { dimension: 'parts', message: 'every ring must be of one part' }];
  if (!d.rings.flat().every(({ z, y, r }) => Number.isFinite(z) && Number.isFinite(y) && r >= 0))
    return [
      ...faults,
      { dimension: 'rings', message: 'every corner needs two places, and a radius of 0 or more' },
    ];
  return [...faults, ...ringFaults(d.rings)];
}

function tubeFaults(d: TubeDimensions): DimensionFault[] {
  const faults = positive([
    ['h', d.h],
    ['b', d.b],
    ['t', d.t],
  ]);
  const least = Math.min(d.h, d.b);
  if (2 * d.t >= least) faults.push({ dimension: 't', message: 'the walls fill the tube' });
  if (!(d.ro >= 0 && d.ri >= 0 && 2 * d.ro <= least && 2 * (d.ri + d.t) <= least)) {
    faults.push({ dimension: 'ro', message: 'the corner radii do not fit into the tube' });
  }
  return faults;
}

/** Why a section with these dimensions cannot exist; empty where it can. */
export function dimensionFaults(d: SectionDimensions): DimensionFault[] {
  switch (d.shape) {
    case 'i':
    case 'channel':
    case 'tee':
    case 'tapered_i':
    case 'tapered_channel':
      return flangedFaults(d);
    case 'angle':
      return angleFaults(d);
    case 'rhs':
    case 'shs':
      return tubeFaults(d);
    case 'chs': {
      const faults = positive([
        ['d', d.d],
        ['t', d.t],
      ]);
      return 2 * d.t > d.d ? [...faults, { dimension: 't', message: 'the walls fill the tube' }] : faults;
    }
    case 'rectangle':
      return positive([
        ['h', d.h],
        ['b', d.b],
      ]);
    case 'round':
      return positive([['d', d.d]]);
    case 'outline':
      return outlineFaults(d);
    case 'values':
      return positive(
        (['h', 'b', 't', 'area', 'iMajor', 'iMinor', 'wElMajor', 'wElMinor', 'shearArea'] as const).map(
          (name) => [name, d[name]] as const,
        ),
      );
  }
}

export class ImpossibleSection extends Error {
  constructor(readonly faults: readonly DimensionFault[]) {
    super(faults.map((fault) => fault.message).join('; '));
    this.name = 'ImpossibleSection';
  }
}
