import { ratio, type Timing } from './measure';

export function heading(text: string): void {
  console.info(`\n${text}\n`);
}

const figures = (value: number): string =>
  value >= 100 ? value.toFixed(0) : value >= 10 ? value.toFixed(1) : value.toFixed(2);

/** A contestant: microseconds a solve, solves a second, and how many times longer it takes than the reference. */
export function row(timing: Timing, reference?: Timing): void {
  const { name, median } = timing;
  const times = reference && reference !== timing ? `${figures(ratio(timing, reference))} ×` : '';
  const second = Math.round(1e6 / median).toLocaleString('en');
  console.info(
    `  ${name.padEnd(44)}${figures(median).padStart(12)} µs${second.padStart(14)} /s${times.padStart(14)}`,
  );
}

/** What the figure is to be, at least or at most, beside what it is. */
export function target(what: string, is: number, limit: number, side: 'least' | 'most' = 'least'): void {
  const met = side === 'least' ? is >= limit : is <= limit;
  console.info(`  ${met ? 'met   ' : 'MISSED'}  ${what}: ${figures(is)}, to be at ${side} ${limit}`);
}
