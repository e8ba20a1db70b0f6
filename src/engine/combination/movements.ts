import type { Beam, Restraint } from '../model/index';

const movementOf = (restraint: Restraint): number => (restraint.kind === 'free' ? 0 : restraint.movement);

/** Whether any support is moved as prescribed. */
export const supportsMove = ({ supports }: Pick<Beam, 'supports'>): boolean =>
  supports.some(({ vertical, rotation }) => movementOf(vertical) !== 0 || movementOf(rotation) !== 0);

const unmoved = (restraint: Restraint): Restraint =>
  restraint.kind === 'free' ? restraint : { ...restraint, movement: 0 };

/** The same beam on supports that stay where they are. */
export const stillBeam = (beam: Beam): Beam => ({
  ...beam,
  supports: beam.supports.map((support) => ({
    ...support,
    vertical: unmoved(support.vertical),
    rotation: unmoved(support.rotation),
  })),
});
