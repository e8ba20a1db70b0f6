import { formatFor, type UnitSystemName } from '../quantity/index';
import { depthOf, type SectionDimensions, widthOf } from './dimensions';
import { outlineCorners } from './outline';
import { type SectionProperties, sectionProperties } from './properties';
import { flatten } from './rings';

/** What stands for I and W_el about the major axis where nothing holds a section sideways, m⁴ and m³. */
type FreeBending = { iMajor: number; wElMajor: number };

const CHORDS = 24; // of a rounded corner, as for W_pl

/**
 * Bending under a load along the web of a section that is free to move sideways: with D = I_y I_z − I_yz² it deflects down
 * as with D/I_z, and σ = M (I_z y − I_yz z)/D is greatest at a corner (Timoshenko, Strength of Materials, unsymmetrical
 * bending). Null where the axes are principal: it then bends as it does when it is held.
 */
export function freeBending(
  d: SectionDimensions,
  { iMinor, principal, centroid, centroidUp }: SectionProperties = sectionProperties(d),
): FreeBending | null {
  if (principal === null) return null;
  const product = (-(principal.iU - principal.iV) / 2) * Math.sin(2 * principal.angle);
  const both = principal.iU * principal.iV;
  const stresses = outlineCorners(d)
    .flatMap((ring) => flatten(ring, CHORDS))
    .map(({ y, z }) => Math.abs(iMinor * (y - centroidUp) - product * (z - centroid)));
  return { iMajor: both / iMinor, wElMajor: both / Math.max(...stresses) };
}

/** Beyond this share of the width a shear centre off the centroid twists what is loaded through its web. */
const OFF_CENTRE = 0.01;

/**
 * What the elastic checks take for granted of a section and a designer must see to: how it bends where it is not held
 * sideways, and that a load beside the shear centre twists it. Empty of a section with two axes of symmetry.
 */
export function sectionCautions(d: SectionDimensions, system: UnitSystemName): string[] {
  const found = sectionProperties(d);
  const free = freeBending(d, found);
  const second = (value: number) => formatFor(value, 'second_moment', system);
  const modulus = (value: number) => formatFor(value, 'section_modulus', system);
  const cautions: string[] = [];
  if (free)
    cautions.push(
      `Neither axis is one of symmetry. The checks take it to be held sideways, so that it bends about its major axis. Free to move sideways it bends as with I = ${second(free.iMajor)} and W_{el} = ${modulus(free.wElMajor)}, in place of ${second(found.iMajor)} and ${modulus(found.wElMajor)}.`,
    );
  if (d.shape === 'angle')
    cautions.push('A load that does not pass where the legs meet twists it. Torsion is not checked.');
  else if (Math.abs(found.shearCentre - found.centroid) > OFF_CENTRE * widthOf(d))
    cautions.push(
      `Its shear centre lies ${formatFor(-found.shearCentre, 'section_size', system)} outside the back of its web: a load through the web twists it unless it is held against that. Torsion is not checked.`,
    );
  else if (d.shape === 'outline' && isLopsided(d, found))
    cautions.push(
      'Its shear centre is not found: a load that does not pass through it twists the section. Torsion is not checked.',
    );
  return cautions;
}

/** Not the same to the left and to the right: the shear centre then need not stand over the centroid. */
const isLopsided = (d: SectionDimensions, { centroid }: SectionProperties): boolean =>
  Math.abs(2 * centroid - widthOf(d)) > OFF_CENTRE * Math.max(widthOf(d), depthOf(d));
