import type { ReactNode } from 'react';

/** R_{B} and mm^{4} in running text. */
export function RichHtml({ text }: { text: string }): ReactNode {
  return text.split(/([_^]\{[^}]*\})/).map((part, i) => {
    const mark = /^([_^])\{(.*)\}$/.exec(part);
    // biome-ignore lint/suspicious/noArrayIndexKey: the runs of one text have no identity but their place
    if (mark) return mark[1] === '_' ? <sub key={i}>{mark[2]}</sub> : <sup key={i}>{mark[2]}</sup>;
    return part;
  });
}
