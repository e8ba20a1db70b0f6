import { supportLetter } from '@/engine/model';
import { choicesOf } from './choices';
import type { Pointer } from './edit';
import { ChoiceAt } from './fields';
import { useListAt } from './use-editor';

/** One of the beam's supports, by its letter. */
export function SupportAt({ at }: { readonly at: Pointer }) {
  const supports = useListAt('/beam/supports');
  return (
    <ChoiceAt at={at} label="Support" choices={choicesOf(supports.map((_, index) => supportLetter(index)))} />
  );
}
