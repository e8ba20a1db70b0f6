import { useEffect, useRef } from 'react';
import { Notice } from '@/components/ui/Notice';
import { SheetHead } from '@/components/ui/SheetHead';
import type { Fault } from '@/lib/app-error';
import { paths } from '@/paths';
import type { ImportView } from './imports';
import { ABOUT_LABELS, countWords, DELIMITER_WORDS, ENCODING_WORDS, MARK_WORDS } from './words';

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
      {problem && <ProblemNotice key={JSON.stringify(problem)} problem={problem} />}
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

/** Why something was refused; it comes into view, since what was pressed may be far below. */
function ProblemNotice({
  problem: { message, faults },
}: {
  problem: NonNullable<ImportHeadProps['problem']>;
}) {
  const host = useRef<HTMLDivElement>(null);
  useEffect(() => {
    host.current?.scrollIntoView({ block: 'nearest' });
  }, []);
  // A new table's address is made from its name: one fault, not two.
  const isNamed = !faults.some(({ pointer }) => pointer === '/about/name');
  const shown = faults.filter(({ pointer }) => isNamed || pointer !== '/about/table');
  if (shown.length < 2)
    return (
      <div ref={host}>
        <Notice tone="error" title={shown[0] ? `${fieldOf(shown[0])}${shown[0].message}` : message} />
      </div>
    );
  return (
    <div ref={host}>
      <Notice tone="error" title={`${shown.length} things are missing or wrong.`}>
        <ul>
          {shown.map((fault) => (
            <li key={fault.pointer + fault.message}>{`${fieldOf(fault)}${fault.message}`}</li>
          ))}
        </ul>
      </Notice>
    </div>
  );
}

/** The label of the field that a fault is of, as it begins a line. */
function fieldOf({ pointer }: Fault): string {
  const name = Object.entries(ABOUT_LABELS).find(([key]) => pointer === `/about/${key}`)?.[1];
  return name ? `${name}: ` : '';
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
