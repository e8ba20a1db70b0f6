/**
 * Whether the hand is at the drawing, and what it chose is told there: then the form opens its row without the page
 * being taken away. With the beam alone in view, above the form, the form goes to the row.
 */
export function isAtDrawing(): boolean {
  const bar = document.querySelector('[data-drawing=bar]');
  const isTold = bar !== null && bar.getBoundingClientRect().bottom > 0;
  return isTold && document.activeElement?.closest('[data-drawing]') != null;
}
