import type { Fault } from '@/lib/app-error';

/** Why something was not done: in words, and what is wrong with which field. */
export interface Refused {
  readonly message: string;
  readonly faults: readonly Fault[];
}

const isAt = (fault: Fault, pointer: string): boolean =>
  fault.pointer === pointer || fault.pointer.startsWith(`${pointer}/`);

/** What is said at a field, as `/designation`. */
export const saidAt = (refused: Refused | null, pointer: string): string | undefined =>
  refused?.faults.find((fault) => isAt(fault, pointer))?.message;

/** What none of these fields says; null where they say it all. */
export function saidElsewhere(refused: Refused | null, pointers: readonly string[]): string | null {
  if (!refused) return null;
  const { message, faults } = refused;
  if (faults.length === 0) return message;
  const others = faults.filter((fault) => !pointers.some((pointer) => isAt(fault, pointer)));
  return others.length === 0 ? null : others.map((fault) => fault.message).join(' ');
}
