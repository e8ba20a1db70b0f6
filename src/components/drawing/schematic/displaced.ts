import type { DisplacedShape } from '@/engine/model/index';
import type { Map1 } from '../geometry/curve';

/**
 * Path of a mechanism, its largest movement `reach` px. The engine's sense is arbitrary: what moves most is drawn moving down,
 * as it would under gravity.
 */
export function displacedPath(motion: DisplacedShape, toX: Map1, base: number, reach: number): string {
  const most = motion.reduce(
    (far, corner) => (Math.abs(corner.deflection) > Math.abs(far) ? corner.deflection : far),
    0,
  );
  const perUnit = most === 0 ? 0 : reach / most;
  return `M${motion.map(({ x, deflection }) => `${toX(x).toFixed(1)} ${(base + deflection * perUnit).toFixed(1)}`).join('L')}`;
}
