/**
 * The address of a link that says where it was followed from, with this page as it stands by now: an island keeps its
 * values in the address, which had others when the link was written.
 */
export function fromHere(link: HTMLAnchorElement): string {
  const to = new URL(link.href);
  if (link.hasAttribute('data-from-here')) to.searchParams.set('from', location.pathname + location.search);
  return to.pathname + to.search + to.hash;
}
