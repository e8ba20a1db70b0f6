/** The lettered circle of a support, zone or item. */
export function Bubble({
  x,
  y,
  letter,
  radius = 10,
}: {
  x: number;
  y: number;
  letter: string;
  radius?: number;
}) {
  return (
    <>
      <circle cx={x} cy={y} r={radius} className="thin on-paper" />
      <text x={x} y={y + 4} textAnchor="middle" className="bubble-letter">
        {letter}
      </text>
    </>
  );
}
