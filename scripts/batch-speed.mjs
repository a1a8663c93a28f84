// Time of many internal impedances at once as a ratio to as many exponentials, in turns: a figure that needs nothing but
// Node, so that a test can hold it. scripts/bench-skin.mjs records it in fixtures/bessel/speed.json.
export const wire = { radius: 0.5e-3, conductivity: 58e6, relativePermeability: 1 };
export const SEED = 20240611;

/** Angular frequencies [rad/s] with a/delta log-uniform between the limits; Park and Miller's generator (1988). */
export function frequencies(from, to, count) {
  let state = SEED;
  const unit = 2 / (4e-7 * Math.PI * wire.conductivity * wire.radius ** 2);
  return Float64Array.from({ length: count }, () => {
    state = (state * 48271) % 2147483647;
    return unit * (from * (to / from) ** (state / 2147483647)) ** 2;
  });
}

export const median = (values) => values.toSorted((a, b) => a - b)[values.length >> 1];

/** [1] median time of `impedances(wire, omega, re, im)` over that of an exponential a point, a/delta 1e-3 .. 1e4 */
export function ratioToExponentials(impedances, points = 300_000, rounds = 9) {
  const omega = frequencies(1e-3, 1e4, points);
  const [re, im] = [new Float64Array(points), new Float64Array(points)];
  const [own, plain] = [[], []];
  for (let round = 0; round < rounds; round++) {
    const start = performance.now();
    impedances(wire, omega, re, im);
    const middle = performance.now();
    for (let i = 0; i < points; i++) re[i] = Math.exp(-re[i] * 1e-9);
    plain.push(performance.now() - middle);
    own.push(middle - start);
  }
  return median(own) / median(plain);
}
