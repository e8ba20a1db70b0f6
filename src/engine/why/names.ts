const LETTERS: Readonly<Record<string, string>> = {
  r: "w'",
  l: '\\ell',
  kappa: '\\kappa',
  theta: '\\theta',
  psi: '\\psi',
};

/** The letter of a name in the engine's own formulas, as TeX. */
export const texOf = (name: string): string => LETTERS[name] ?? name;
