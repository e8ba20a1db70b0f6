import katex from 'katex';

/** TeX as HTML in the KaTeX faces, set in a line, so that a long formula goes on in the next at an operator. */
export const setLine = (tex: string): string =>
  katex.renderToString(tex, { displayMode: false, throwOnError: false, output: 'htmlAndMathml' });
