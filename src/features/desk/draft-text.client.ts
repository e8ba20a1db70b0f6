/** A fault's link puts the caret on its line of the document's text, and the line into view. */
const area = document.querySelector<HTMLTextAreaElement>('[data-document-text]');

function select(text: HTMLTextAreaElement, line: number): void {
  const lines = text.value.split('\n');
  const before = lines.slice(0, line - 1);
  const start = before.reduce((sum, one) => sum + one.length + 1, 0);
  text.focus();
  text.setSelectionRange(start, start + (lines[line - 1]?.length ?? 0));
  text.scrollTop = (text.scrollHeight * Math.max(0, line - 6)) / Math.max(1, lines.length);
}

for (const link of document.querySelectorAll<HTMLAnchorElement>('[data-line]'))
  link.addEventListener('click', (event) => {
    if (!area) return;
    event.preventDefault();
    select(area, Number(link.dataset['line']));
  });

const form = area?.form;
let isChanged = false;
form?.addEventListener('input', () => {
  isChanged = true;
});
form?.addEventListener('submit', () => {
  isChanged = false;
});
window.addEventListener('beforeunload', (event) => {
  if (isChanged) event.preventDefault();
});
