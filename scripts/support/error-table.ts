type Row = { count: number; sum: number; worst: number; where: string };

/** Mean and worst error of each family of samples, with the samples that are missed or skipped. */
export class ErrorTable {
  private readonly rows = new Map<string, Row>();
  private readonly wrong: string[] = [];

  constructor(
    readonly title: string,
    readonly reason: string,
  ) {}

  /** A sample: an error that is not at most the limit, NaN too, is a miss. */
  add(family: string, error: number, limit: number, where: string): void {
    const row = this.rows.get(family) ?? { count: 0, sum: 0, worst: 0, where };
    const worse = !(error <= row.worst);
    this.rows.set(family, {
      count: row.count + 1,
      sum: row.sum + error,
      worst: worse ? error : row.worst,
      where: worse ? where : row.where,
    });
    if (!(error <= limit)) this.wrong.push(`missed: ${family}, ${where}: ${error} of ${limit}`);
  }

  skip(where: string, why: string): void {
    this.wrong.push(`skipped: ${this.title}, ${where}: ${why}`);
  }

  /** Everything that is missed or skipped; a table without a sample has skipped all. */
  faults(): string[] {
    return this.rows.size > 0 ? [...this.wrong] : [...this.wrong, `skipped: ${this.title}: no sample`];
  }

  print(): string {
    const width = Math.max(...[...this.rows.keys()].map((family) => family.length));
    const rows = [...this.rows].sort(([a], [b]) => a.localeCompare(b, 'en', { numeric: true }));
    const lines = rows.map(([family, { count, sum, worst, where }]) =>
      [
        family.padEnd(width),
        String(count).padStart(6),
        (sum / count).toExponential(1).padStart(8),
        worst.toExponential(1).padStart(8),
        worst === 0 ? '' : where,
      ].join('  '),
    );
    const head = [''.padEnd(width), ' count', '    mean', '   worst', 'the worst is at'].join('  ');
    return [`${this.title} (what is left is ${this.reason})`, head, ...lines].join('\n');
  }
}
