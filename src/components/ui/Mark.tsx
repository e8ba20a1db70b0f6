/** The product's mark: a putlog built into a wall and resting on a support. */
export function Mark() {
  return (
    <svg
      width="34"
      height="22"
      viewBox="0 0 34 22"
      aria-hidden="true"
      fill="none"
      className="flex-none stroke-ink"
    >
      <path d="M1 6l4-4M1 11l6-6M1 16l6-6M1 21l6-6M4 21l3-3" />
      <path d="M7.5 1V21M22 20.5h11" strokeWidth="1.4" />
      <path d="M3 9.5H31" strokeWidth="3.2" />
      <path d="M27.5 11l3.6 6.5h-7.2z" strokeWidth="1.2" />
    </svg>
  );
}
