import type { ReactNode } from 'react';

type Run = { text: string; shift: 'none' | 'sub' | 'sup' };

function runsOf(source: string): Run[] {
  return source
    .split(/([_^]\{[^}]*\})/)
    .filter((part) => part !== '')
    .map((part) => {
      const mark = /^([_^])\{(.*)\}$/.exec(part);
      if (!mark) return { text: part, shift: 'none' };
      return { text: mark[2] ?? '', shift: mark[1] === '_' ? 'sub' : 'sup' };
    });
}

const DROP = { none: 0, sub: 3, sup: -4 } as const;

/** SVG text in which R_{B} is lowered and mm^{4} raised. */
export function Rich({ text }: { text: string }): ReactNode {
  if (!/[_^]\{/.test(text)) return text;
  let level = 0;
  return runsOf(text).map((run, i) => {
    const dy = DROP[run.shift] - level;
    level = DROP[run.shift];
    return (
      // biome-ignore lint/suspicious/noArrayIndexKey: the runs of one text have no identity but their place
      <tspan key={i} dy={dy || undefined} className={run.shift === 'none' ? undefined : 'small'}>
        {run.text}
      </tspan>
    );
  });
}

/** The same text for names and spoken labels. */
export function plain(text: string): string {
  return text.replace(/[_^]\{([^}]*)\}/g, '$1');
}
