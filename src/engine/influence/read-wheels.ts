import type { Fault, Reading } from '../model/index';
import type { Wheel } from './train';

/** The wheels, or everything that keeps them from being a train; paths begin with a wheel's place in the list. */
export function readWheels(wheels: readonly Wheel[]): Reading<readonly Wheel[]> {
  const faults: Fault[] = [];
  const fail = (path: Fault['path'], code: Fault['code'], message: string) =>
    faults.push({ path, code, message });
  if (wheels.length === 0) fail([], 'required', 'The train has no wheel. Give one.');
  wheels.forEach(({ offset, force }, i) => {
    if (!(offset >= 0 && Number.isFinite(offset)))
      fail(
        [i, 'offset'],
        'out_of_range',
        'A wheel cannot be ahead of the front. Give its distance behind it.',
      );
    if (!(force > 0 && Number.isFinite(force)))
      fail([i, 'force'], 'not_positive', 'The force of a wheel must be more than zero.');
  });
  return faults.length > 0 ? { ok: false, faults } : { ok: true, value: wheels };
}
