import type { Path, Reader } from './reader';
import type { Restraint, Support, SupportDocument, SupportKind } from './types';
import { metres } from './words';

const HOLDS: Record<SupportKind, { vertical: boolean; rotation: boolean; horizontal: boolean }> = {
  fixed: { vertical: true, rotation: true, horizontal: true },
  pin: { vertical: true, rotation: false, horizontal: true },
  roller: { vertical: true, rotation: false, horizontal: false },
  guided: { vertical: false, rotation: true, horizontal: true },
  free: { vertical: false, rotation: false, horizontal: false },
};

/** One direction of a support: its words, and the fields that speak of it. */
const VERTICAL = { held: 'vertical movement', spring: 'kv', movement: 'rise' } as const;
const ROTATION = { held: 'rotation', spring: 'kr', movement: 'rotation' } as const;

export function readSupports(reader: Reader, documents: readonly SupportDocument[]): Support[] {
  if (documents.length === 0) reader.fail(['supports'], 'required', 'The beam has no support. Add one.');
  const taken = new Set<number>();
  return documents.flatMap((document, i) => {
    const path = ['supports', i];
    const support = readSupport(reader, document, path);
    if (!support) return [];
    if (taken.has(support.at)) {
      const message = `Another support is at ${metres(support.at)} already. Keep one of them.`;
      reader.fail([...path, 'at'], 'duplicate', message);
    }
    taken.add(support.at);
    return [support];
  });
}

function readSupport(reader: Reader, document: SupportDocument, path: Path): Support | null {
  const at = reader.position(document.at, [...path, 'at']);
  const { kind } = document;
  const { horizontal, ...holds } = HOLDS[kind];
  const vertical = readRestraint(reader, document, holds.vertical, VERTICAL, path);
  const rotation = readRestraint(reader, document, holds.rotation, ROTATION, path);
  return at === null ? null : { at, kind, vertical, rotation, horizontal };
}

function readRestraint(
  reader: Reader,
  document: SupportDocument,
  rigid: boolean,
  direction: typeof VERTICAL | typeof ROTATION,
  path: Path,
): Restraint {
  const { [direction.spring]: spring, [direction.movement]: moved } = document;
  const stiffness =
    spring === undefined ? null : reader.positive(spring, [...path, direction.spring], 'A spring stiffness');
  const movement = moved === undefined ? 0 : reader.number(moved, [...path, direction.movement]);
  if (rigid && spring !== undefined) {
    const message = `A ${document.kind} support holds ${direction.held} already. Remove ${direction.spring}, or choose a kind that leaves it free.`;
    reader.fail([...path, direction.spring], 'restrained', message);
  }
  if (!rigid && spring === undefined && moved !== undefined) {
    const message = `A ${document.kind} support does not hold ${direction.held}, so it cannot be moved that way. Remove ${direction.movement}, or add ${direction.spring}.`;
    reader.fail([...path, direction.movement], 'unrestrained', message);
  }
  if (rigid) return { kind: 'rigid', movement: movement ?? 0 };
  return stiffness === null ? { kind: 'free' } : { kind: 'spring', stiffness, movement: movement ?? 0 };
}
