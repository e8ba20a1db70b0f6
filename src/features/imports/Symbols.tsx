import { Fragment } from 'react';

/** Running text with its symbols set: W_pl with its index below. */
export function Symbols({ text }: { text: string }) {
  const parts = text.split(/\b([A-Za-z])_([a-z]+(?:,[a-z]+)?)\b/);
  return parts.map((part, at) => {
    // Text, letter, index, text, letter, index, … text.
    if (at % 3 === 1) return null;
    return (
      // biome-ignore lint/suspicious/noArrayIndexKey: the runs of one text have no identity but their place
      <Fragment key={at}>
        {at % 3 === 2 ? (
          <>
            <i>{parts[at - 1]}</i>
            <sub>{part}</sub>
          </>
        ) : (
          part
        )}
      </Fragment>
    );
  });
}
