import type { Material } from '@/engine/section';

/** How a material is named: by its id, or by its set's slug and its id, "en-338-2016/c24". */
export const materialKey = (id: string, slug?: string | undefined): string =>
  slug === undefined ? id : `${slug}/${id}`;

export function readMaterialKey(key: string): { slug: string | undefined; id: string } {
  const [first = '', second] = key.trim().toLowerCase().split('/');
  return second === undefined ? { slug: undefined, id: first } : { slug: first, id: second };
}

/** A material that a section may be made of, as the member's sheet offers it. */
export interface MaterialChoice {
  readonly key: string;
  readonly material: Material;
  /** The set that it is read from; null for a member older than the sets. */
  readonly set: { readonly slug: string; readonly name: string; readonly revision: number } | null;
}

/** A material by its key, or by its id alone where that is how it is named. */
export const choiceOf = (choices: readonly MaterialChoice[], key: string): MaterialChoice | undefined =>
  choices.find((choice) => choice.key === key) ??
  choices.find(({ material }) => material.id === readMaterialKey(key).id);

/** Choices as a list offers them: by their sets too where two have a name in common. */
export const namedChoices = (choices: readonly MaterialChoice[]): { value: string; label: string }[] =>
  choices.map(({ key, material, set }) => {
    const isAlone = choices.filter((other) => other.material.name === material.name).length === 1;
    return { value: key, label: isAlone ? material.name : `${material.name}, ${set?.name ?? 'as shipped'}` };
  });
