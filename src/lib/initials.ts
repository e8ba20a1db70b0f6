/** "Imogen Fairlocke" signs a line of a revision list as "IF". */
export const initialsOf = (name: string): string =>
  name
    .split(/\s+/)
    .map((word) => word.charAt(0))
    .join('');
