/** Cautions that follow from a case: each starts where its reason says, and only within the frequencies of the case. */
import { describe, expect, it } from 'vitest';
import { caseFromData } from '../../src/input/index.ts';
import { type Case, MU0 } from '../../src/model/index.ts';
import { caseCautions, frequencyTable } from '../../src/sweep/index.ts';

async function pair(
  to: string,
  wire: object = {},
  changes: { spacing?: string; length?: string } = {},
): Promise<Case> {
  const { spacing = '15 mm', ...rest } = changes;
  const result = await caseFromData({
    rimflow: 1,
    wires: {
      a: { diameter: '2 mm', ...wire, at: ['0 mm', '0 mm'] },
      b: { diameter: '2 mm', at: [spacing, '0 mm'] },
    },
    loops: { pair: { go: 'a', return: 'b' } },
    frequencies: ['50 Hz', to],
    ...rest,
  });
  if (result.case === undefined) throw new Error(result.problems.map((p) => p.line()).join('\n'));
  return result.case;
}

/** [Hz] where a caution starts; undefined where there is none. */
function start(c: Case, code: string): number | undefined {
  return caseCautions(c).find((caution) => caution.code === code)?.from_hz;
}

describe('cautions', () => {
  it('are none for a long pair of copper at audio frequencies', async () => {
    expect(caseCautions(await pair('20 kHz', {}, { length: '10 m' }))).toEqual([]);
  });

  it('WAVELENGTH from a spacing of a twentieth of the wavelength: 15 mm at 0.99931 GHz (299792458 m/s)', async () => {
    expect(start(await pair('1 GHz'), 'WAVELENGTH')).toBeCloseTo(999308193.33, 1);
    expect(start(await pair('0.999 GHz'), 'WAVELENGTH')).toBeUndefined();
  });

  it('SHORT_RUN below ten spacings', async () => {
    const codes = async (length: string) =>
      caseCautions(await pair('1 kHz', {}, { length })).map(({ code }) => code);
    expect(await codes('149 mm')).toEqual(['SHORT_RUN']);
    expect(await codes('150 mm')).toEqual([]);
  });

  it('ANOMALOUS_SKIN where the depth is ten free paths: copper, 39.9 nm (Gall 2016, from memory), 27.4 GHz', async () => {
    // delta = sqrt(rho / (pi f mu0)) with rho = 1/58 ohm mm2/m
    const f = start(await pair('100 GHz'), 'ANOMALOUS_SKIN')!;
    expect(Math.sqrt(1 / (58e6 * Math.PI * f * MU0)) / 39.9e-9).toBeCloseTo(10, 9);
    expect(f / 27.4e9).toBeCloseTo(1, 2);
    expect(start(await pair('27 GHz'), 'ANOMALOUS_SKIN')).toBeUndefined();
  });

  it('ANOMALOUS_SKIN starts lower in the cold, where the free path is longer', async () => {
    const cold = await pair('100 GHz', { temperature: '-50 °C' });
    const warm = await pair('100 GHz');
    expect(start(cold, 'ANOMALOUS_SKIN')!).toBeLessThan(start(warm, 'ANOMALOUS_SKIN')!);
  });

  it('ROUGHNESS where the formula of Hammerstad and Jensen (1980, from memory) gives 1 % for 0.3 um rms', async () => {
    const f = start(await pair('10 GHz'), 'ROUGHNESS')!;
    const depth = Math.sqrt(1 / (58e6 * Math.PI * f * MU0));
    expect((2 / Math.PI) * Math.atan(1.4 * (0.3e-6 / depth) ** 2)).toBeCloseTo(0.01, 10);
  });

  it('ROUGHNESS names the metal where it starts first: a magnetic one has the smaller depth', async () => {
    const c = await pair('10 GHz', { material: 'steel' });
    expect(caseCautions(c).find(({ code }) => code === 'ROUGHNESS')?.text).toContain('steel');
  });

  it('MAGNETIC at any frequency, naming the wires', async () => {
    const caution = caseCautions(await pair('50.1 Hz', { material: 'nickel' })).find(
      ({ code }) => code === 'MAGNETIC',
    );
    expect(caution?.text).toContain('"a"');
    expect(caution?.from_hz).toBeUndefined();
  });

  it('say nothing of perfect conductors but their spacing', async () => {
    const c = await pair('100 GHz', { material: 'perfect' });
    const perfect = { ...c, wires: c.wires.map((wire) => ({ ...c.wires[0], name: wire.name, x: wire.x })) };
    expect(caseCautions(perfect).map(({ code }) => code)).toEqual(['WAVELENGTH']);
  });

  it('stand behind those of the file, and in the table', async () => {
    const c = await pair('1 kHz', { stranded: '2 mm²' }, { length: '1 cm' });
    const codes = ['STRAND_AS_WIRE', 'SHORT_RUN'];
    expect(caseCautions(c).map(({ code }) => code)).toEqual(codes);
    expect((await frequencyTable(c)).cautions.map(({ code }) => code)).toEqual(codes);
  });
});
