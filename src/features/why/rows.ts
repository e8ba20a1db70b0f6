/** The tree of a number as the rows that are in view. Pure. */
import type { Part, Trace } from '@/engine/why';
import { isLeaf } from './words';

/** Places from the root: "0/2" is the third part of the first part of it. */
export type Path = string;
export const ROOT: Path = '';

export interface Row {
  readonly path: Path;
  readonly depth: number;
  /** The letter that it has in what it is part of, as TeX. */
  readonly name: string;
  readonly trace: Trace;
  readonly canOpen: boolean;
  readonly isOpen: boolean;
  /** Among its siblings, from 1. */
  readonly position: number;
  readonly siblings: number;
}

/** Parts that are one number are shown once. */
const partsOf = ({ parts }: Trace): Part[] =>
  parts.filter(
    (part, i) => parts.findIndex((other) => other.name === part.name && other.trace === part.trace) === i,
  );

const under = (path: Path, place: number): Path => (path === ROOT ? String(place) : `${path}/${place}`);
const parentOf = (path: Path): Path | null =>
  path === ROOT ? null : path.includes('/') ? path.slice(0, path.lastIndexOf('/')) : ROOT;

/** The root, and the parts of all that is open. */
export function rowsOf(root: Trace, open: ReadonlySet<Path>): Row[] {
  const walk = (trace: Trace, own: Pick<Row, 'path' | 'depth' | 'name' | 'position' | 'siblings'>): Row[] => {
    const canOpen = !isLeaf(trace.how) && trace.parts.length > 0;
    const isOpen = canOpen && open.has(own.path);
    const parts = isOpen ? partsOf(trace) : [];
    return [
      { ...own, trace, canOpen, isOpen },
      ...parts.flatMap((part, k) =>
        walk(part.trace, {
          path: under(own.path, k),
          depth: own.depth + 1,
          name: part.name,
          position: k + 1,
          siblings: parts.length,
        }),
      ),
    ];
  };
  return walk(root, { path: ROOT, depth: 0, name: root.symbol, position: 1, siblings: 1 });
}

/** From the root to a row. */
export function trailOf(rows: readonly Row[], path: Path): Row[] {
  const trail: Row[] = [];
  for (let at: Path | null = path; at !== null; at = parentOf(at)) {
    const row = rows.find((one) => one.path === at);
    if (row) trail.unshift(row);
  }
  return trail;
}

export interface TreeState {
  readonly open: ReadonlySet<Path>;
  readonly active: Path;
}

/** What a key does in a tree (WAI-ARIA's pattern); null where it does nothing. */
export function afterKey(rows: readonly Row[], { open, active }: TreeState, key: string): TreeState | null {
  const at = rows.findIndex(({ path }) => path === active);
  const row = rows[at];
  if (!row) return null;
  const goTo = (next: Row | undefined): TreeState | null => (next ? { open, active: next.path } : null);
  switch (key) {
    case 'ArrowDown':
      return goTo(rows[at + 1]);
    case 'ArrowUp':
      return goTo(rows[at - 1]);
    case 'Home':
      return goTo(rows[0]);
    case 'End':
      return goTo(rows.at(-1));
    case 'ArrowRight':
      if (!row.canOpen) return null;
      return row.isOpen ? goTo(rows[at + 1]) : { open: new Set([...open, active]), active };
    case 'ArrowLeft':
      if (row.isOpen) return { open: without(open, active), active };
      return goTo(rows.find(({ path }) => path === parentOf(active)));
    case 'Enter':
    case ' ':
      return row.canOpen ? { open: toggled(open, active), active } : null;
    case '*':
      return { open: new Set([...open, ...siblingsOf(rows, active)]), active };
    default:
      return null;
  }
}

const without = (open: ReadonlySet<Path>, path: Path): Set<Path> =>
  new Set([...open].filter((one) => one !== path));

export const toggled = (open: ReadonlySet<Path>, path: Path): ReadonlySet<Path> =>
  open.has(path) ? without(open, path) : new Set([...open, path]);

const siblingsOf = (rows: readonly Row[], active: Path): Path[] =>
  rows.filter(({ path }) => parentOf(path) === parentOf(active)).map(({ path }) => path);
