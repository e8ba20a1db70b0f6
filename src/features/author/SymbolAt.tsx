import { useEffect, useRef, useState } from 'react';
import { Field } from '@/components/ui/Field';
import type { Pointer } from './edit';
import { useReadOnly } from './fields';
import { isOwnSymbol, renameEdits } from './rename';
import { useDraft, useFaultAt, useTextAt } from './use-editor';

/** The symbol of a parameter, column or derived value; left, it is renamed wherever it is spoken of. */
export function SymbolAt({ at }: { readonly at: Pointer }) {
  const store = useDraft();
  const symbol = useTextAt(`${at}/symbol`);
  const [typed, setTyped] = useState(symbol);
  const good = useRef(symbol);
  useEffect(() => {
    setTyped(symbol);
    if (isOwnSymbol(store.document, symbol)) good.current = symbol;
  }, [store, symbol]);
  const commit = () => {
    if (typed !== symbol) store.edit(...renameEdits(store.document, at, good.current, typed));
  };
  return (
    <Field
      data-at={`${at}/symbol`}
      label="Symbol"
      maxLength={20}
      autoComplete="off"
      spellCheck={false}
      readOnly={useReadOnly()}
      help="Changed here, it is changed in every expression; formulas in TeX are yours to change."
      error={useFaultAt(`${at}/symbol`)}
      value={typed}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={commit}
      onKeyDown={(event) => {
        if (event.key === 'Enter') commit();
        const isUndo = (event.ctrlKey || event.metaKey) && event.key.toLowerCase() === 'z';
        if (typed === symbol || (event.key !== 'Escape' && !isUndo)) return;
        // What is not in the draft yet is taken back here.
        event.preventDefault();
        event.stopPropagation();
        setTyped(symbol);
      }}
    />
  );
}
