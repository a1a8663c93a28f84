/** Internal impedance of one solid wire at many frequencies at once. */
import { internalImpedanceRatios } from './impedance-pieces.ts';
import { type RoundWire, squaredArgument } from './round-wire.ts';
import { solidResistanceDc } from './solid.ts';

/**
 * Z_int = R + jX of each frequency, each part within 1e-14 relative. The rise R - R_dc by itself is better taken from
 * `solidInternalInductance`.
 * @param omega [rad/s] each finite and >= 0
 * @param re receives R [ohm/m], length of omega
 * @param im receives X [ohm/m], length of omega
 * @throws Problem DOMAIN as `squaredArgument`
 */
export function solidInternalImpedances(
  wire: RoundWire,
  omega: Float64Array,
  re: Float64Array,
  im: Float64Array,
): void {
  const perRadian = squaredArgument(wire, 1);
  if (perRadian === Infinity) {
    for (let i = 0; i < omega.length; i++) squaredArgument(wire, omega[i]!);
    re.fill(0, 0, omega.length);
    im.fill(0, 0, omega.length);
    return;
  }
  for (let i = 0; i < omega.length; i++) {
    const w = omega[i]!;
    // says what is wrong
    if (!(w >= 0 && w < Infinity)) squaredArgument(wire, w);
    im[i] = w * perRadian;
  }
  internalImpedanceRatios(im.length === omega.length ? im : im.subarray(0, omega.length), re, im);
  const resistance = solidResistanceDc(wire);
  for (let i = 0; i < omega.length; i++) {
    re[i]! *= resistance;
    im[i]! *= resistance;
  }
}
