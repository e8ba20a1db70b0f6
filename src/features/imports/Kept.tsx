import { useRef, useState } from 'react';
import { Button } from '@/components/ui/Button';
import { paths } from '@/paths';
import type { ImportView } from './imports';
import { type Acted, uploadSource } from './imports.api';
import { sizeWords } from './words';

interface KeptProps {
  readonly view: ImportView;
  readonly isEditable: boolean;
  readonly act: (work: () => Promise<Acted>) => Promise<boolean>;
}

/** The files that lie beside the table, and what was put right in it. */
export function Kept({ view, isEditable, act }: KeptProps) {
  const { id, version, file, source_document: source, fixes } = view;
  const here = paths.api.import(id);
  return (
    <div className="mt-14 grid gap-x-20 gap-y-14 border-t border-rule pt-10 md:grid-cols-2">
      <div>
        <h3 className="caps mb-4">The file as it was brought</h3>
        <p className="wrap-anywhere">
          <a className="link" href={`${here}/file`} download>
            {file.name}
          </a>
          , {sizeWords(file.bytes)}
        </p>
        <p className="text-note wrap-anywhere text-ink-2">SHA-256 {file.sha256}</p>
      </div>
      <div>
        <h3 className="caps mb-4">The document that it was made from</h3>
        {source ? (
          <>
            <p className="wrap-anywhere">
              <a className="link" href={`${here}/source`} download>
                {source.name}
              </a>
            </p>
            <p className="text-note wrap-anywhere text-ink-2">SHA-256 {source.sha256}</p>
          </>
        ) : (
          <p className="text-ink-2">
            None was brought. A page of the catalogue helps whoever reviews the edition.
          </p>
        )}
        {isEditable && (
          <BringSource
            {...{ id, version, act }}
            word={source ? 'Bring another' : 'Bring a PDF or a picture'}
          />
        )}
      </div>
      {fixes.length > 0 && (
        <details className="md:col-span-2">
          <summary className="link flex min-h-26 items-center max-md:min-h-44">
            What was put right: {fixes.length}
          </summary>
          <ol className="mt-4 list-decimal pl-20">
            {fixes.map(({ label, place, by, at }) => (
              <li key={`${at} ${place} ${label}`}>
                {label} <span className="text-ink-2">({[place, by].filter(Boolean).join(', ')})</span>
              </li>
            ))}
          </ol>
        </details>
      )}
      <p className="md:col-span-2">
        <a className="link" href={paths.importReport(id)}>
          Report, for print
        </a>
      </p>
    </div>
  );
}

interface BringSourceProps extends Pick<KeptProps, 'act'> {
  readonly id: string;
  readonly version: number;
  readonly word: string;
}

function BringSource({ id, version, word, act }: BringSourceProps) {
  const pick = useRef<HTMLInputElement>(null);
  const [share, setShare] = useState<number | null>(null);
  async function bring(file: File | undefined) {
    if (!file) return;
    setShare(0);
    const { signal } = new AbortController();
    await act(() => uploadSource(id, version, file, { onProgress: setShare, signal }));
    setShare(null);
  }
  return (
    <div className="mt-6">
      <input
        ref={pick}
        type="file"
        accept=".pdf,.png,.jpg,.jpeg,.txt"
        aria-label="The document that the values are from"
        tabIndex={-1}
        className="sr-only"
        onChange={({ target }) => void bring(target.files?.[0])}
      />
      {share === null ? (
        <Button size="small" onClick={() => pick.current?.click()}>
          {word}
        </Button>
      ) : (
        <progress className="import-progress w-full" value={share} aria-label="Sent" />
      )}
    </div>
  );
}
