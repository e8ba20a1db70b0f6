import { createContext, useContext } from 'react';
import type { Kinds } from '@/engine/template/author';
import type { Written } from '@/features/review/draft';
import { symbolNames } from './complete';
import { listAt, textAt } from './edit';
import { kindsIn, type Scene } from './expression';
import { useSnapshot } from './use-editor';

/** What the expressions inside speak of. */
interface ExpressionScene {
  readonly scene: Scene;
  /** The list that the part is repeated over. */
  readonly repeat: string;
}

export const SceneContext = createContext<ExpressionScene>({ scene: 'beam', repeat: '' });

let last: {
  signature: string;
  document: Written;
  kinds: Map<string, Kinds>;
  names: ReadonlyMap<string, string>;
} | null = null;

/** What decides the kinds and the names of symbols, and changes less often than the document. */
function vocabulary(document: Written) {
  if (
    last &&
    last.document['parameters'] === document['parameters'] &&
    last.document['derived'] === document['derived'] &&
    Object(last.document['beam']).supports === Object(document['beam']).supports
  )
    return last;
  const signature = signatureOf(document);
  if (last?.signature === signature) last = { ...last, document };
  else last = { signature, document, kinds: new Map(), names: symbolNames(document) };
  return last;
}

const KEYS = ['/symbol', '/name', '/kind', '/dimension', '/expression'] as const;

function signatureOf(document: Written): string {
  const entries = [...listAt(document, '/parameters'), ...listAt(document, '/derived')];
  const said = entries
    .flatMap((entry) => [entry, ...listAt(entry, '/columns')])
    .map((entry) => [
      ...KEYS.map((key) => textAt(entry, key)),
      ...listAt(entry, '/options').map((option) => textAt(option, '/value')),
    ]);
  const supports = listAt(document, '/beam/supports').map((support) => textAt(support, '/when'));
  return JSON.stringify([said, supports]);
}

function kindsOf(document: Written, { scene, repeat }: ExpressionScene): Kinds {
  const { kinds } = vocabulary(document);
  const key = `${scene} ${repeat}`;
  const known = kinds.get(key);
  if (known) return known;
  const made = kindsIn(document, scene, repeat);
  kinds.set(key, made);
  return made;
}

/** The kinds of everything that an expression may speak of here; the same map as long as they are the same. */
export function useKinds(): Kinds {
  const scene = useContext(SceneContext);
  return useSnapshot(({ history }) => kindsOf(history.document, scene));
}

export const useSymbolNames = (): ReadonlyMap<string, string> =>
  useSnapshot(({ history }) => vocabulary(history.document).names);
