import { Notice } from '@/components/ui/Notice';
import { SheetHead } from '@/components/ui/SheetHead';
import type { Fault } from '@/lib/app-error';
import { paths } from '@/paths';
import type { ImportView } from './imports';
import { countWords, DELIMITER_WORDS, ENCODING_WORDS, MARK_WORDS } from './words';

interface ImportHeadProps {
  readonly view: ImportView;
  readonly mapping: ImportView['mapping'];
  readonly problem: { readonly message: string; readonly faults: readonly Fault[] } | null;
}

/** What the file is, and whatever has to be said across the whole sheet. */
export function ImportHead({ view, mapping, problem }: ImportHeadProps) {
  const { state, error, twin, table, edition, file } = view;
  const title = table
    ? `${table.name}${edition ? `, edition ${edition.number}` : ', from a file'}`
    : file.name;
  return (
    <>
      <SheetHead
        trail={[
          { label: 'Library', href: paths.library },
          { label: 'Imports', href: paths.imports },
        ]}
        reference={file.name}
        title={title}
        facts={factsOf(view, mapping)}
      />
      {problem && (
        <Notice tone="error" title={problem.message}>
          {problem.faults.length > 1 && (
            <ul>
              {problem.faults.map(({ pointer, message }) => (
                <li key={pointer + message}>{`${fieldOf(pointer)}${message}`}</li>
              ))}
            </ul>
          )}
        </Notice>
      )}
      {error && (
        <Notice tone="error" title={error}>
          <p>
            The file is kept as it was brought. Change what was said of it and check it again, or bring
            another one.
          </p>
        </Notice>
      )}
      {twin && state !== 'committed' && state !== 'cancelled' && (
        <Notice title="This very file was brought before.">
          <p>
            <a href={paths.import(twin.id)}>See what became of it</a>
          </p>
        </Notice>
      )}
    </>
  );
}

/** "/about/catalogue_date" as it begins a line: "Catalogue date: ". */
function fieldOf(pointer: string): string {
  const name = /^\/about\/(\w+)$/.exec(pointer)?.[1]?.replaceAll('_', ' ');
  return name ? `${name.charAt(0).toUpperCase()}${name.slice(1)}: ` : '';
}

function factsOf(
  { rows, recognised }: ImportView,
  { columns, decimalMark, encoding }: ImportView['mapping'],
) {
  return [
    { label: 'Rows', value: rows === null ? 'not counted yet' : countWords(rows) },
    { label: 'Columns', value: String(columns.length) },
    { label: 'Separator', value: DELIMITER_WORDS[recognised.delimiter] },
    { label: 'Decimal mark', value: decimalMark === null ? 'not said' : MARK_WORDS[decimalMark] },
    { label: 'Encoding', value: encoding === null ? 'not said' : (ENCODING_WORDS[encoding] ?? encoding) },
  ];
}
