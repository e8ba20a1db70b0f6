import { memo, useMemo } from 'react';
import { Formula } from '@/features/template/Formula';
import { setTex } from '@/features/template/tex';

/** A letter in running text. */
export const Letter = memo(function Letter({ tex }: { readonly tex: string }) {
  const html = useMemo(() => setTex(tex, false), [tex]);
  return <Formula html={html} className="[&_.katex]:text-[1em]!" />;
});
