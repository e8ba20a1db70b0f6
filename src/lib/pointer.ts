/** JSON Pointer (RFC 6901) to the value at a path of keys and indices. The empty path is the whole document, ''. */
export const pointer = (path: readonly PropertyKey[]): string =>
  path.map((key) => `/${String(key).replaceAll('~', '~0').replaceAll('/', '~1')}`).join('');
