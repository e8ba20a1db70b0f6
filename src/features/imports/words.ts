import type { Axes, Cause } from '@/features/section/import/contract';
import type { About } from './imports';
import type { ImportPhase, ImportState } from './state';

export const STATE_LABELS: Readonly<Record<ImportState, string>> = {
  mapping: 'Waits for its columns',
  checking: 'Being checked',
  findings: 'Checked',
  committing: 'Being written',
  committed: 'An edition',
  cancelled: 'Cancelled',
  failed: 'Broken off',
};

export const PHASE_WORDS: Readonly<Record<ImportPhase, string>> = {
  reading: 'Reading the file',
  checking: 'Checking lines',
  writing: 'Writing lines into the edition',
};

export const DELIMITER_WORDS = { ',': 'comma', ';': 'semicolon', '\t': 'tab', '|': 'bar' } as const;
export const MARK_WORDS = { '.': 'point', ',': 'comma' } as const;

export const LANGUAGE_WORDS: Readonly<Record<string, string>> = {
  en: 'English',
  de: 'German',
  fr: 'French',
  it: 'Italian',
  es: 'Spanish',
  nl: 'Dutch',
  sv: 'Swedish',
};

export const ENCODING_WORDS: Readonly<Record<string, string>> = {
  'utf-8': 'UTF-8',
  'utf-16le': 'UTF-16',
  'utf-16be': 'UTF-16, big end first',
  'windows-1252': 'Western (Windows 1252)',
  'windows-1251': 'Cyrillic (Windows 1251)',
  'iso-8859-2': 'Central European (ISO 8859-2)',
  macintosh: 'Macintosh',
};

/** "columns_swapped" in a sentence. */
export const causeWords = (cause: Cause): string => cause.replaceAll('_', ' ');

const GROUPED = new Intl.NumberFormat('en-GB');
/** "12 400", with a thin space that does not break. */
export const countWords = (count: number): string => GROUPED.format(count).replaceAll(',', '\u202f');

export const sizeWords = (bytes: number): string =>
  bytes < 1000
    ? `${bytes} B`
    : bytes < 1e6
      ? `${Math.round(bytes / 1000)} kB`
      : `${(bytes / 1e6).toFixed(1)} MB`;

/** What is asked of a table, as its fields are called. */
export const ABOUT_LABELS: Readonly<Record<keyof About, string>> = {
  table: 'Name of the table',
  name: 'Name of the table',
  reference: 'Number',
  supplier: 'Supplier',
  standard: 'Standard',
  source: 'Source document',
  catalogue_date: 'Day of the catalogue',
  licence: 'Licence note',
  conventions: 'Conventions',
  notes: 'Notes',
};

export const AXES_NAMES: Readonly<Record<Axes, string>> = {
  en: 'EN',
  us: 'US',
  british: 'British before 2005',
};
