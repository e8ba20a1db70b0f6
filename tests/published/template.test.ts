import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { type Solution, solveBeam } from '@/engine/beam';
import { admissibleSets, type Beam, checkRedundants, type Redundant, readBeam } from '@/engine/model';
import { isProven, proveSolution } from '@/engine/proof';
import { instantiate, readParameters, runProofCases, type Template } from '@/engine/template';
import { authorTemplate } from '@/engine/template/author';

const FOLDER = 'data/templates';
const files = readdirSync(FOLDER).filter((file) => file.endsWith('.json'));

function load(file: string): Template {
  const authored = authorTemplate(JSON.parse(readFileSync(`${FOLDER}/${file}`, 'utf8')));
  if (authored.ok) return authored.template;
  throw new Error(
    authored.faults.map(({ path, message }) => `${file} ${path.join('/')}: ${message}`).join('\n'),
  );
}

function beamAt(template: Template, parameters: Readonly<Record<string, unknown>> = {}): Beam {
  const values = readParameters(template, parameters);
  if (!values.ok) throw new Error(JSON.stringify(values.faults));
  const made = instantiate(template, values.values);
  if (!made.ok) throw new Error(JSON.stringify(made.faults));
  const reading = readBeam(made.instance.beam);
  if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
  return reading.value;
}

describe.each(files)('%s', (file) => {
  const template = load(file);

  test('its proof cases agree with the formulas and the printed figures', () => {
    const results = runProofCases(template);
    expect(results.length).toBeGreaterThanOrEqual(3);
    for (const { name, checks, fault } of results) {
      expect(fault, name).toBeUndefined();
      for (const check of checks) expect(check.ok, `${name}: ${JSON.stringify(check)}`).toBe(true);
    }
  });
});
