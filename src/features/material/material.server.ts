import { and, eq } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { document } from '@/db/schema/library';
import { MATERIALS, type Material, materialFor, materialIn, materialsOf } from '@/engine/section';
import { currentRevisions, type LibraryRevision, revisionsById } from '@/features/review/library.server';
import { holdForUse } from '@/features/review/pin.server';
import { type Fault, invalid } from '@/lib/app-error';
import { contentHash } from '@/lib/fingerprint';
import { type MaterialChoice, materialKey, readMaterialKey } from './choice';
import { materialSetDocument } from './material';

/** A material and the revision of the set that it is read from; null for one that is as Putlog ships it. */
export interface PlacedMaterial {
  readonly material: Material;
  readonly set: LibraryRevision | null;
}

/** A revision of a set with its materials. */
interface ReadMaterials {
  readonly set: LibraryRevision;
  readonly materials: readonly Material[];
}

/** The materials of a stored revision. */
export const readMaterials = (set: LibraryRevision): ReadMaterials => ({
  set,
  materials: materialsOf(materialSetDocument.parse(set.body)),
});

/** What sections may be made of: the issued revision of each set. */
async function issuedMaterials(tx: Tx, practiceId: string): Promise<ReadMaterials[]> {
  const revisions = await currentRevisions(tx, practiceId, 'material-set');
  return revisions.filter(({ state }) => state === 'issued').map(readMaterials);
}

/** A material as a member's row holds it; undefined where the set does not have it. */
export async function pinnedMaterial(
  tx: Tx,
  practiceId: string,
  id: string,
  revisionId: string | null,
): Promise<PlacedMaterial | undefined> {
  if (revisionId === null) return shipped(id);
  const [found] = await revisionsById(tx, practiceId, [revisionId]);
  const material = found && materialIn(readMaterials(found).materials, id);
  return material && { material, set: found };
}

const shipped = (id: string): PlacedMaterial | undefined => {
  const material = materialFor(id);
  return material && { material, set: null };
};

/**
 * A material by its id, alone or after its set ("en-338-2016/c24"): of the issued sets, or as shipped in a practice that
 * keeps none. 422 at `at` where there is none, or several.
 */
export async function chooseMaterial(
  tx: Tx,
  practiceId: string,
  key: string,
  at = '/section',
): Promise<PlacedMaterial> {
  const sets = await issuedMaterials(tx, practiceId);
  const { slug, id } = readMaterialKey(key);
  const found = sets.flatMap(({ set, materials }): PlacedMaterial[] => {
    const material = slug === undefined || slug === set.slug ? materialIn(materials, id) : undefined;
    return material ? [{ material, set }] : [];
  });
  const [first, ...others] = found;
  if (first && others.length === 0) return first;
  if (!first && sets.length === 0 && !(await keepsSets(tx, practiceId))) {
    const own = shipped(id);
    if (own) return own;
  }
  throw invalid([first ? ambiguous(key, found, at) : unknown(key, sets, at)]);
}

async function keepsSets(tx: Tx, practiceId: string): Promise<boolean> {
  const [any] = await tx
    .select({ id: document.id })
    .from(document)
    .where(and(eq(document.practiceId, practiceId), eq(document.kind, 'material-set')))
    .limit(1);
  return any !== undefined;
}

function unknown(key: string, sets: readonly ReadMaterials[], at: string): Fault {
  const known = sets.flatMap(({ materials }) => materials.map(({ id }) => id)).join(', ');
  const choice = known === '' ? 'Ask a librarian to issue its set.' : `Give one of ${known}.`;
  return {
    pointer: `${at}/material`,
    code: 'unknown_material',
    message: `There is no material “${key}” in the issued sets. ${choice}`,
  };
}

const ambiguous = (key: string, found: readonly PlacedMaterial[], at: string): Fault => ({
  pointer: `${at}/material`,
  code: 'ambiguous_material',
  message: `“${key}” is in several sets. Give one of ${found.map(({ material, set }) => `“${materialKey(material.id, set?.slug)}”`).join(', ')}.`,
});

/** The material that a section is to be made of: what is pinned stays as it is, another comes from an issued set. */
export async function placeMaterial(
  tx: Tx,
  practiceId: string,
  key: string,
  pinned: PlacedMaterial | null,
): Promise<PlacedMaterial> {
  const isSame = pinned !== null && isNamed(pinned, key);
  if (isSame && pinned.set) return pinned;
  const chosen = await adopt(tx, practiceId, key, isSame ? pinned : null);
  if (chosen.set) await holdForUse(tx, practiceId, chosen.set.revisionId, '/section', { isNew: !isSame });
  return chosen;
}

const isNamed = ({ material, set }: PlacedMaterial, key: string): boolean => {
  const { slug, id } = readMaterialKey(key);
  return material.id === id && (slug === undefined || slug === set?.slug);
};

/** A member older than the sets is given the issued one that says the same of its material, and else stays as it is. */
async function adopt(
  tx: Tx,
  practiceId: string,
  key: string,
  held: PlacedMaterial | null,
): Promise<PlacedMaterial> {
  if (held === null) return chooseMaterial(tx, practiceId, key);
  const sets = await issuedMaterials(tx, practiceId);
  for (const { set, materials } of sets) {
    const material = materialIn(materials, held.material.id);
    if (material && isSameMaterial(material, held.material)) return { material, set };
  }
  return held;
}

/** Also of a strength without limit in thickness, which has no JSON form. */
const isSameMaterial = (a: Material, b: Material): boolean =>
  contentHash(finite(a)) === contentHash(finite(b));
const finite = (material: Material) =>
  material.kind === 'steel'
    ? { ...material, strength: material.strength.map((band) => ({ ...band, upTo: String(band.upTo) })) }
    : material;

/** What a section may be made of: the pinned revision of its set, and the issued one of every other. */
export async function materialChoices(
  tx: Tx,
  practiceId: string,
  pinned: PlacedMaterial | null,
): Promise<MaterialChoice[]> {
  const issued = await issuedMaterials(tx, practiceId);
  const held = pinned?.set ? [readMaterials(pinned.set)] : [];
  const others = issued.filter(({ set }) => set.slug !== pinned?.set?.slug);
  const choices = [...held, ...others].flatMap(({ set, materials }) =>
    materials.map((material) => ({
      key: materialKey(material.id, set.slug),
      material,
      set: { slug: set.slug, name: set.name, revision: set.number },
    })),
  );
  const own = pinned && !pinned.set ? [pinned.material] : [];
  const shipped = (await keepsSets(tx, practiceId)) ? own : MATERIALS;
  return [...shipped.map((material) => ({ key: material.id, material, set: null })), ...choices];
}
