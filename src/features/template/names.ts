/** A template's TeX letter as drawings and labels write it: "a_1" as "a_{1}", "\text{loads}" as "loads". */
export const drawnName = (tex: string): string =>
  tex
    .replaceAll(/\\text\{([^}]*)\}/g, '$1')
    .replaceAll(/_([A-Za-z0-9])/g, '_{$1}')
    .replaceAll(/\\([a-zA-Z]+)/g, (_, name: string) => GREEK[name] ?? name);

const GREEK: Readonly<Record<string, string>> = {
  alpha: 'α',
  beta: 'β',
  delta: 'δ',
  Delta: 'Δ',
  theta: 'θ',
  kappa: 'κ',
  phi: 'φ',
};
