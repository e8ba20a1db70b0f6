import katex from 'katex';

/** TeX as HTML with the KaTeX faces. A formula that cannot be set is shown as it is written. */
export const setTex = (tex: string, isDisplay = true): string =>
  katex.renderToString(tex, { displayMode: isDisplay, throwOnError: false, output: 'htmlAndMathml' });
