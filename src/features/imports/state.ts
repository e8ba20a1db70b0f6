/** How far an import is. Of an upload that is refused nothing is kept, so that there is no state before `mapping`. */
export const IMPORT_STATES = [
  /** Kept and recognised; the librarian says what its columns are. */
  'mapping',
  'checking',
  /** Checked: what was found waits to be put right or accepted. */
  'findings',
  'committing',
  /** Its rows are an edition; the report never changes again. */
  'committed',
  'cancelled',
  'failed',
] as const;
export type ImportState = (typeof IMPORT_STATES)[number];

/** The worker is at it. */
export const UNDER_WAY = ['checking', 'committing'] as const satisfies readonly ImportState[];
/** A person may say something else of it. */
export const OPEN = ['mapping', 'findings', 'failed'] as const satisfies readonly ImportState[];

/** What the worker does of an import: reads the file once, checks its rows, and writes them into the edition. */
export const IMPORT_PHASES = ['reading', 'checking', 'writing'] as const;
export type ImportPhase = (typeof IMPORT_PHASES)[number];
