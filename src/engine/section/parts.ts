import {
  depthOf,
  type OutlineDimensions,
  type SectionDimensions,
  type TaperedChannelDimensions,
  type TaperedIDimensions,
  type ValuesDimensions,
  widthOf,
} from './dimensions';
import { fillet, fourFillets, type Part, rectangle, sumOf } from './part';

type MadeOfParts = Exclude<
  SectionDimensions,
  TaperedIDimensions | TaperedChannelDimensions | OutlineDimensions | ValuesDimensions
>;

/** Whether right angles, fillets and circles are all that bounds a section. */
export const isMadeOfParts = (d: SectionDimensions): d is MadeOfParts =>
  !('slope' in d) && d.shape !== 'outline' && d.shape !== 'values';

/**
 * The section as rectangles and fillets: y from mid-depth, z from its line of symmetry, of a channel and an angle from
 * the back.
 */
export function partsOf(d: MadeOfParts): Part[] {
  switch (d.shape) {
    case 'i': {
      const flange = (d.h - d.tf) / 2;
      return [
        rectangle(d.tw, d.h - 2 * d.tf),
        rectangle(d.b, d.tf, flange),
        rectangle(d.b, d.tf, -flange),
        ...fourFillets(d.r, d.h / 2 - d.tf, d.tw / 2, { up: -1, right: 1 }, 1),
      ];
    }
    case 'channel': {
      const flange = (d.h - d.tf) / 2;
      const outstand = d.b - d.tw;
      return [
        rectangle(d.tw, d.h, 0, d.tw / 2),
        rectangle(outstand, d.tf, flange, d.tw + outstand / 2),
        rectangle(outstand, d.tf, -flange, d.tw + outstand / 2),
        fillet(d.r, { y: d.h / 2 - d.tf, z: d.tw }, -1, 1, 1),
        fillet(d.r, { y: d.tf - d.h / 2, z: d.tw }, 1, 1, 1),
      ];
    }
    case 'tee': {
      const under = d.h / 2 - d.tf;
      return [
        rectangle(d.b, d.tf, (d.h - d.tf) / 2),
        rectangle(d.tw, d.h - d.tf, -d.tf / 2),
        fillet(d.r, { y: under, z: d.tw / 2 }, -1, 1, 1),
        fillet(d.r, { y: under, z: -d.tw / 2 }, -1, -1, 1),
      ];
    }
    case 'angle': {
      const bottom = -d.h / 2;
      return [
        rectangle(d.t, d.h, 0, d.t / 2),
        rectangle(d.b - d.t, d.t, bottom + d.t / 2, (d.b + d.t) / 2),
        fillet(d.r, { y: bottom + d.t, z: d.t }, 1, 1, 1),
        fillet(d.toe, { y: d.h / 2, z: d.t }, -1, -1, -1),
        fillet(d.toe, { y: bottom + d.t, z: d.b }, -1, -1, -1),
      ];
    }
    case 'rhs':
    case 'shs':
      return [
        rectangle(d.b, d.h),
        rectangle(d.b - 2 * d.t, d.h - 2 * d.t, 0, 0, -1),
        ...fourFillets(d.ro, d.h / 2, d.b / 2, { up: -1, right: -1 }, -1),
        ...fourFillets(d.ri, d.h / 2 - d.t, d.b / 2 - d.t, { up: -1, right: -1 }, 1),
      ];
    case 'rectangle':
      return [rectangle(d.b, d.h)];
    case 'chs':
      return [...disc(d.d, 1), ...disc(d.d - 2 * d.t, -1)];
    case 'round':
      return disc(d.d, 1);
  }
}

function disc(d: number, sign: 1 | -1): Part[] {
  const own = (sign * Math.PI * d ** 4) / 64;
  const plastic = (sign * d ** 3) / 6;
  const area = (sign * Math.PI * d ** 2) / 4;
  return [
    {
      area,
      y: 0,
      z: 0,
      ownMajor: own,
      ownMinor: own,
      ownProduct: 0,
      plasticMajor: plastic,
      plasticMinor: plastic,
    },
  ];
}

/** Of the parts together: area, centroid from the bottom and the left edge, I about it, and the product ∫yz dA there. */
export function momentsOf(d: SectionDimensions, parts: readonly Part[]) {
  const area = sumOf(parts, (part) => part.area);
  const y = sumOf(parts, (part) => part.area * part.y) / area;
  const z = sumOf(parts, (part) => part.area * part.z) / area;
  const isFromBack = d.shape === 'channel' || d.shape === 'angle';
  return {
    area,
    y: depthOf(d) / 2 + y,
    z: isFromBack ? z : widthOf(d) / 2 + z,
    iMajor: sumOf(parts, (part) => part.ownMajor + part.area * (part.y - y) ** 2),
    iMinor: sumOf(parts, (part) => part.ownMinor + part.area * (part.z - z) ** 2),
    product: sumOf(parts, (part) => part.ownProduct + part.area * (part.y - y) * (part.z - z)),
  };
}
