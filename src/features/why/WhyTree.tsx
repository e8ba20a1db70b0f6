import { type KeyboardEvent, useEffect, useRef } from 'react';
import type { UnitSystemName } from '@/engine/quantity';
import { formatValue } from '@/engine/why';
import { Letter } from './Letter';
import { afterKey, type Path, type Row, type TreeState, toggled } from './rows';
import { leafWords } from './words';

interface WhyTreeProps {
  readonly rows: readonly Row[];
  readonly state: TreeState;
  readonly system: UnitSystemName;
  readonly onChange: (state: TreeState) => void;
}

/** The chain as an outline. One stop of the Tab key; arrow keys go along it, open and close. */
export function WhyTree({ rows, state, system, onChange }: WhyTreeProps) {
  const host = useRef<HTMLDivElement>(null);
  const { open, active } = state;
  useEffect(() => {
    const { current } = host;
    const row = current?.querySelector<HTMLElement>(`[data-path="${active}"]`);
    row?.scrollIntoView({ block: 'nearest' });
    if (current?.contains(document.activeElement)) row?.focus({ preventScroll: true });
  }, [active]);
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    const next = afterKey(rows, state, event.key);
    if (!next) return;
    event.preventDefault();
    onChange(next);
  };
  return (
    <div
      ref={host}
      role="tree"
      aria-labelledby="why-title"
      onKeyDown={onKeyDown}
      className="min-h-0 flex-1 overflow-y-auto pb-20"
    >
      {rows.map((row) => (
        <Item
          key={row.path}
          row={row}
          isActive={row.path === active}
          system={system}
          onChoose={() => onChange({ open, active: row.path })}
          onToggle={() => onChange({ open: toggled(open, row.path), active: row.path })}
        />
      ))}
    </div>
  );
}

interface ItemProps {
  readonly row: Row;
  readonly isActive: boolean;
  readonly system: UnitSystemName;
  readonly onChoose: (path: Path) => void;
  readonly onToggle: () => void;
}

const INDENT = 16;
const MOST_INDENT = 8;

function Item({ row, isActive, system, onChoose, onToggle }: ItemProps) {
  const { path, depth, name, trace, canOpen, isOpen, position, siblings } = row;
  const end = leafWords(trace);
  return (
    // biome-ignore lint/a11y/useKeyWithClickEvents: the tree handles its keys, as its role asks
    <div
      role="treeitem"
      data-path={path}
      aria-level={depth + 1}
      aria-posinset={position}
      aria-setsize={siblings}
      aria-selected={isActive}
      aria-expanded={canOpen ? isOpen : undefined}
      tabIndex={isActive ? 0 : -1}
      onClick={() => onChoose(path)}
      style={{ paddingLeft: `calc(var(--pad) + ${Math.min(depth, MOST_INDENT) * INDENT}px)` }}
      className={`grid min-h-34 cursor-default grid-cols-[22px_minmax(0,1fr)_auto] items-center border-b border-rule pr-(--pad) text-schedule outline-none focus-visible:outline-2 focus-visible:-outline-offset-2 focus-visible:outline-ochre pointer-coarse:min-h-44 ${isActive ? 'bg-ochre-wash shadow-[inset_3px_0_0_var(--color-ochre)]' : 'hover:bg-paper-2'}`}
    >
      <span
        aria-hidden="true"
        onClick={(event) => {
          if (!canOpen) return;
          event.stopPropagation();
          onToggle();
        }}
        className={`-ml-6 grid min-h-34 w-24 place-items-center self-stretch font-semibold ${canOpen ? 'cursor-pointer' : ''}`}
      >
        {canOpen ? (isOpen ? '\u2212' : '+') : ''}
      </span>
      <span className="min-w-0 py-4">
        {name !== '' && (
          <span className="mr-8">
            <Letter tex={name} />
          </span>
        )}
        {trace.label}
        {end !== '' && <span className="block text-note text-ink-2">{end}</span>}
      </span>
      <span className="pl-10 text-right whitespace-nowrap">{formatValue(trace, system)}</span>
    </div>
  );
}
