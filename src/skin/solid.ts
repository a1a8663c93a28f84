/**
 * The solid wire alone: resistance and internal inductance, exact at all frequencies.
 * Z_int = k/(2 pi a sigma) I_0(q)/I_1(q) (Schelkunoff 1934; McLachlan 1955), q = ka, q^2 = jT. With r_n = q I_{n+1}/I_n
 * and the recurrence it becomes Z_int/R_dc = 1 + r_1/2, and again, free of cancellation at low frequencies,
 *
 *   (Z_int - R_dc) / (j omega) = mu/(8 pi) * 4 / (4 + r_2).
 */
import { rayRatio } from './bessel/ray-ratios.ts';
import { permeability, type RoundWire, squaredArgument } from './round-wire.ts';

const ratio = new Float64Array(2);

/** [ohm/m] resistance at 0 Hz; 0 for a perfect conductor. */
export function solidResistanceDc(wire: RoundWire): number {
  return 1 / (Math.PI * wire.conductivity * wire.radius * wire.radius);
}

/**
 * Complex internal inductance L(omega) = (Z_int - R_dc) / (j omega): the reactance is omega Re L, and the rise of the
 * resistance above its value at 0 Hz is R - R_dc = -omega Im L, each part with full relative accuracy at any frequency.
 * At 0 Hz it is mu/(8 pi); for a perfect conductor 0.
 * @param omega [rad/s] >= 0
 * @param out receives [re, im] [H/m] at 0, 1
 * @throws Problem DOMAIN as `squaredArgument`
 */
export function solidInternalInductance(wire: RoundWire, omega: number, out: Float64Array): void {
  const t = squaredArgument(wire, omega);
  if (t === Infinity) {
    out[0] = 0;
    out[1] = 0;
    return;
  }
  rayRatio(2, t, ratio);
  const re = 4 + ratio[0]!;
  const im = ratio[1]!;
  const scale = permeability(wire) / (2 * Math.PI) / (re * re + im * im);
  out[0] = scale * re;
  out[1] = -scale * im;
}
