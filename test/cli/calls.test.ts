/** The command line on a machine in memory: what is written where, and the code and exit status of every wrong call. */
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { PAIR, run, tableOf } from './fake-io.ts';

describe('table', () => {
  it('writes CSV where nobody looks on, and nothing else', async () => {
    expect(await run(['table', 'pair.yaml'])).toMatchObject({
      status: 0,
      out: 'frequency_Hz,supply_R_ohm_per_m,supply_L_H_per_m\r\n50,1,4e-7\r\n1000,2,4e-7\r\n1000000,3,4e-7\r\n',
      err: '',
    });
  });
  it('writes text on a terminal', async () => {
    const { out } = await run(['table', 'pair.yaml'], { terminal: true });
    expect(out).toMatch(/^a pair\n\nfrequency +supply R +supply L\n +ohm\/m +nH\/m\n/);
  });
  it.each([
    ['out.csv', 'frequency_Hz,'],
    ['out.json', '{\n  "rimflow"'],
    ['out.md', '## a pair'],
    ['out', 'frequency_Hz,'],
  ])('takes the format from the ending of --out %s', async (path, start) => {
    const { status, out, err, written } = await run(['table', 'pair.yaml', '--out', path], {
      terminal: true,
    });
    expect([status, out]).toEqual([0, '']);
    expect(err).toMatch(new RegExp(`^wrote ${path} \\(3 frequencies, \\w+\\)\n$`));
    expect(written.get(path)?.startsWith(start)).toBe(true);
  });
  it('obeys --format before the ending', async () => {
    const { written } = await run(['table', 'pair.yaml', '--out', 'a.json', '--format', 'csv', '--quiet']);
    expect(written.get('a.json')).toMatch(/^frequency_Hz/);
  });
  it('says no note with --quiet', async () => {
    expect(await run(['table', 'pair.yaml', '--out', 'a.csv', '--quiet'])).toMatchObject({
      status: 0,
      err: '',
    });
  });
  it('multiplies by the length and adds the lumped parts with --total', async () => {
    const { out } = await run(['table', 'pair.yaml', '--total']);
    expect(out.split('\r\n').slice(0, 2)).toEqual([
      'frequency_Hz,supply_R_ohm,supply_L_H',
      '50,2.001,8.1e-7',
    ]);
  });
  it('reads standard input', async () => {
    expect((await run(['table', '-'], { stdin: PAIR })).out).toMatch(/^frequency_Hz,supply_R/);
  });
  it('changes a let name with --set', async () => {
    const spacing: number[] = [];
    const solve = async (c: Parameters<typeof tableOf>[0]) => {
      spacing.push(c.wires[1].x - c.wires[0].x);
      return tableOf(c);
    };
    await run(['table', 'pair.yaml', '--set', 'gap=3 mm'], { solve });
    expect(spacing[0]).toBeCloseTo(5e-3, 12);
  });
  it('makes a pair without a file', async () => {
    const { status, out } = await run(['table', '--gauge', 'AWG 12', '--spacing', '4.1 mm']);
    expect(status).toBe(0);
    const rows = out.trimEnd().split('\r\n');
    expect(rows[0]).toBe('frequency_Hz,pair_R_ohm_per_m,pair_L_H_per_m');
    expect([rows.length - 1, rows[1].split(',')[0], rows.at(-1)?.split(',')[0]]).toEqual([
      71,
      '10',
      '100000000',
    ]);
  });
});

describe('a result that misses its tolerance', () => {
  const solve = async (c: Parameters<typeof tableOf>[0]) =>
    tableOf(c, { reached: false, cautions: [{ code: 'TOLERANCE', text: 'not reached', from_hz: 1e3 }] });
  it('is written, with its errors, and exits 3', async () => {
    const { status, out, err } = await run(['table', 'pair.yaml'], { solve });
    expect(status).toBe(3);
    expect(out).toMatch(
      /^frequency_Hz,supply_R_ohm_per_m,supply_L_H_per_m,supply_R_error,supply_L_error\r\n50,/,
    );
    expect(err).toMatch(/^caution TOLERANCE from 1 kHz: not reached\nNOT_REACHED /);
  });
  it('exits 3 also where cautions fail', async () => {
    expect((await run(['table', 'pair.yaml', '--fail-on-caution'], { solve })).status).toBe(3);
  });
});

describe('cautions', () => {
  const solve = async (c: Parameters<typeof tableOf>[0]) =>
    tableOf(c, { cautions: [{ code: 'MAGNETIC', text: 'wire "a" is magnetic' }] });
  it('go to standard error, with --quiet too', async () => {
    expect(await run(['table', 'pair.yaml', '--quiet'], { solve })).toMatchObject({
      status: 0,
      err: 'caution MAGNETIC: wire "a" is magnetic\n',
    });
  });
  it('fail with --fail-on-caution, the result written', async () => {
    const { status, out, err } = await run(['table', 'pair.yaml', '--fail-on-caution'], { solve });
    expect(status).toBe(1);
    expect(out).toMatch(/^frequency_Hz/);
    expect(err).toMatch(/\nLIMIT 1 caution, /);
  });
  it('are not said twice on a terminal', async () => {
    const { out, err } = await run(['table', 'pair.yaml'], { solve, terminal: true });
    expect([out.includes('MAGNETIC'), err]).toEqual([true, '']);
  });
});

describe('a fault of the program', () => {
  it.each([
    ['an exception', async () => Promise.reject(new TypeError('x is not a function'))],
    [
      'a number that is none',
      async (c: Parameters<typeof tableOf>[0]) => {
        const table = tableOf(c);
        table.loops[0].resistance[1] = Number.NaN;
        return table;
      },
    ],
  ])('%s: one line, status 70, no result, no stack', async (_, solve) => {
    for (const format of ['csv', 'json', 'markdown', 'text']) {
      const { status, out, err, written } = await run(
        ['table', 'pair.yaml', '--format', format, '--out', 'x'],
        { solve },
      );
      expect([status, out, written.size]).toEqual([70, '', 0]);
      expect(err).toMatch(/^INTERNAL a fault of the program.*report.*\n$/);
      expect(err).not.toMatch(/ at |\.ts/);
    }
  });
});

describe('streams', () => {
  it('end quietly where nobody reads', async () => {
    expect(await run(['table', 'pair.yaml'], { stdoutError: 'EPIPE' })).toMatchObject({ status: 0, err: '' });
  });
  it.each(['ENOSPC', 'EIO', 'EWHATEVER'])('%s on standard output: WRITE_FAILED, 74', async (stdoutError) => {
    const { status, err } = await run(['table', 'pair.yaml'], { stdoutError });
    expect(status).toBe(74);
    expect(err).toMatch(/^WRITE_FAILED standard output /);
  });
  it('Ctrl-C while solving: INTERRUPTED, 130', async () => {
    const solve = () => new Promise<never>(() => undefined);
    const { status, out, err } = await run(['table', 'pair.yaml'], { solve, interrupt: true });
    expect([status, out, err]).toEqual([130, '', 'INTERRUPTED stopped by Ctrl-C\n']);
  });
  it('an endless standard input ends at the limit: TOO_LARGE, 2', async () => {
    const stdin = (async function* () {
      for (;;) yield new Uint8Array(1 << 20).fill(32);
    })();
    const { status, err } = await run(['table', '-'], { stdin });
    expect(status).toBe(2);
    expect(err).toMatch(/^<stdin> TOO_LARGE .*10 MB\n$/);
  });
});

describe('progress and colour', () => {
  const solve: NonNullable<Parameters<typeof run>[1]>['solve'] = async (c, { onProgress }) => {
    for (let i = 1; i <= 10; i++) await onProgress?.(i, 10);
    return tableOf(c);
  };
  it('show on a terminal, and the bar goes', async () => {
    const { err } = await run(['table', 'pair.yaml'], { solve, terminal: true, tick: 500 });
    expect(err).toMatch(/solving =+\.* \d+ of 10 frequencies/);
    expect(err.endsWith('\r\u001b[K')).toBe(true);
  });
  it.each([
    ['elsewhere', {}, []],
    ['with --quiet', { terminal: true }, ['--quiet']],
    ['in a short run', { terminal: true, tick: 1 }, []],
  ])('show not %s', async (_, machine, more) => {
    expect((await run(['table', 'pair.yaml', ...more], { solve, tick: 500, ...machine })).err).toBe('');
  });
  it.each([
    ['on a terminal', { terminal: true }, true],
    ['not elsewhere', {}, false],
    ['not with NO_COLOR', { terminal: true, env: { NO_COLOR: '1' } }, false],
    ['not on a dumb terminal', { terminal: true, env: { TERM: 'dumb' } }, false],
  ])('colour %s', async (_, machine, expected) => {
    expect((await run(['table', 'missing.yaml'], machine)).err.includes('\u001b[')).toBe(expected);
  });
});

describe('wrong calls', () => {
  const calls: [string[], number, RegExp][] = [
    [[], 2, /^USAGE no command/],
    [['tabel', 'pair.yaml'], 2, /^USAGE unknown command "tabel" \(did you mean table\?\)/],
    [
      ['table', 'pair.yaml', '--formt', 'csv'],
      2,
      /^USAGE unknown option "--formt" \(did you mean --format\?\)/,
    ],
    [['table', 'pair.yaml', '--format', 'xml'], 2, /^USAGE .*"xml" is invalid.*csv, json, markdown, text/],
    [['table', 'pair.yaml', 'other.yaml'], 2, /^USAGE too many arguments/],
    [['table', 'pair.yaml', '--out'], 2, /^USAGE .*--out/],
    [['table', 'pair.yaml', '--out', ''], 2, /^USAGE --out has an empty path/],
    [['table', 'pair.yaml', '--out', 'pair.yaml'], 2, /^USAGE .*write over the input/],
    [['table', 'pair.yaml', '--set', 'gap'], 2, /^USAGE --set "gap" has no NAME=VALUE/],
    [['table', 'pair.yaml', '--set', 'gap=1 mm', '--set', 'gap=2 mm'], 2, /^USAGE --set gives "gap" twice/],
    [['table', 'pair.yaml', '--gauge', 'AWG 12'], 2, /^USAGE --gauge describes a pair without a file/],
    [['table'], 2, /^USAGE no FILE/],
    [['help', 'table'], 2, /^USAGE unknown command "help"; see rimflow --help/],
    [['table', '--gauge', 'AWG 12'], 2, /^USAGE --gauge without --spacing/],
    [['table', '--spacing', '4 mm'], 2, /^USAGE --spacing without a size/],
    [['table', '--gauge', 'AWG 99', '--spacing', '4 mm'], 2, /UNKNOWN_GAUGE/],
    [['table', '--gauge', 'AWG 12', '--spacing', '4'], 2, /UNIT/],
    [['table', '--gauge', 'AWG 12', '--spacing', '1 mm'], 2, /OVERLAP/],
    [['table', '--gauge', 'AWG 12', '--spacing', '4 mm', '--total'], 2, /^NO_LENGTH/],
    [
      ['table', '--gauge', 'AWG 12', '--spacing', '4 mm', '--set', 'a=1'],
      2,
      /^USAGE --set changes a let name/,
    ],
    [['table', 'missing.yaml'], 74, /^missing.yaml READ_FAILED/],
    [['netlist', '--gauge', 'AWG 12', '--spacing', '4 mm'], 2, /^NO_LENGTH/],
    [['netlist', 'pair.yaml', '--sections', '2', '--within', '1%'], 2, /^USAGE --sections and --within/],
    [['netlist', 'pair.yaml', '--sections', '2.5'], 2, /^USAGE --sections "2.5"/],
    [['netlist', 'pair.yaml', '--sections', '99'], 2, /^USAGE --sections "99"/],
    [['netlist', 'pair.yaml', '--within', '1 mm'], 2, /^UNIT/],
    [['netlist', 'pair.yaml', '--within', '200%'], 2, /^RANGE --within "200%"/],
    [['netlist', 'pair.yaml', '--name', '2 wires'], 2, /^NAME --name "2 wires"/],
    [['netlist', 'pair.yaml', '--form', 'ladder'], 2, /^NOT_SUPPORTED .*--form is not supported yet/],
    [['netlist', 'pair.yaml', '--form=ladder'], 2, /^NOT_SUPPORTED .*not supported yet/],
    [['list'], 2, /^USAGE missing required argument/],
    [['list', 'metals'], 2, /^USAGE there is no list of "metals"/],
    [['list', 'wire'], 2, /did you mean "wires"\?/],
    [['budget', 'pair.yaml'], 2, /^NOT_SUPPORTED the command "budget" is not supported yet/],
    [['sweep', 'pair.yaml', '--out', 'x.csv'], 2, /^NOT_SUPPORTED the command "sweep" is not supported yet/],
    [['draw', '--help'], 2, /^NOT_SUPPORTED the command "draw" is not supported yet/],
  ];
  it.each(calls)('%j: status %i', async (argv, status, message) => {
    const result = await run(argv);
    expect(result.err).toMatch(message);
    expect(result.err.trimEnd()).not.toContain('\n');
    expect([result.status, result.out, result.written.size]).toEqual([status, '', 0]);
  });

  it('tells all problems of a file, each on a line with its place', async () => {
    const stdin = 'rimflow: 1\nwires:\n  a: { diameter: 1, at: [0 mm, 0 mm] }\nlops: {}\n';
    const { status, err } = await run(['check', '-'], { stdin });
    expect(status).toBe(2);
    expect(err).toMatch(/<stdin>:3:\d+ UNIT /);
    expect(err).toMatch(/<stdin>:4:1 UNKNOWN_KEY .*did you mean "loops"/);
  });
  const bad = readdirSync(new URL('../../fixtures/input/bad', import.meta.url));
  it.each(bad)(
    'fixtures/input/bad/%s: status 2, nothing written, one line for each problem',
    async (name) => {
      const stdin = readFileSync(new URL(`../../fixtures/input/bad/${name}`, import.meta.url), 'utf8');
      const expected = [...stdin.matchAll(/^# expect (\d+:\d+ [A-Z_]+) /gm)].map(([, head]) => head);
      const { status, out, err } = await run(['table', '-'], { stdin });
      expect([status, out]).toEqual([2, '']);
      const heads = err
        .trimEnd()
        .split('\n')
        .map((line) => /^<stdin>:(\d+:\d+ [A-Z_]+) /.exec(line)?.[1]);
      expect(heads).toEqual(expected);
    },
  );
  it('lets no text of a file move the cursor', async () => {
    const stdin = PAIR.replace('title: a pair', 'title: "a\\e[2Jb"');
    for (const format of ['text', 'markdown', 'json', 'csv']) {
      expect((await run(['table', '-', '--format', format], { stdin })).out).not.toContain('\u001b');
    }
    expect((await run(['check', '-'], { stdin })).out).not.toContain('\u001b');
  });
});

describe('check', () => {
  it('prints what was understood and computes nothing', async () => {
    const solve = async () => Promise.reject(new Error('solved'));
    const { status, out, err } = await run(['check', 'pair.yaml'], { solve });
    expect([status, err]).toEqual([0, '']);
    expect(out).toMatch(/plus +copper +0 +0 +2 /);
    expect(out).toContain('loop supply: go plus; return minus; extra 1 mohm, 10 nH');
    expect(out).toContain('frequencies: 3 from 50 Hz to 1 MHz');
  });
  it('prints JSON in SI units', async () => {
    const { out } = await run(['check', 'pair.yaml', '--format', 'json']);
    expect(JSON.parse(out)).toMatchObject({
      length_m: 2,
      wires: [{ name: 'plus', radius_m: 0.001 }, { x_m: 0.003 }],
    });
  });
});

describe('list', () => {
  it.each(['wires', 'materials'])('%s in every format, each row with a source', async (what) => {
    const { status, out } = await run(['list', what, '--format', 'json']);
    expect(status).toBe(0);
    const rows = JSON.parse(out) as { source: string }[];
    expect(rows.length).toBeGreaterThan(10);
    for (const { source } of rows) expect(source).not.toBe('');
    const csv = (await run(['list', what, '--format', 'csv'])).out;
    expect(csv.trimEnd().split('\r\n').length).toBe(rows.length + 1);
    expect((await run(['list', what])).out.trimEnd().split('\n').length).toBe(rows.length + 1);
    expect((await run(['list', what, '--format', 'markdown'])).out.trimEnd().split('\n').length).toBe(
      rows.length + 2,
    );
  });
  it('has the sizes of ASTM B258: AWG 12 is 2.0525 mm, of 5.211 mohm/m at 20 °C (1/58 ohm mm2/m)', async () => {
    const { out } = await run(['list', 'wires', '--format', 'csv']);
    const [, diameter, area, resistance] = /\r\nAWG 12,([\d.]+),([\d.]+),([\d.]+),ASTM B258\r\n/.exec(out)!;
    // ASTM B258: d = 0.005 in * 92^((36 - 12)/39)
    const d = 0.127 * 92 ** (24 / 39);
    expect(Number(diameter)).toBeCloseTo(d, 6);
    expect(Number(area)).toBeCloseTo((Math.PI / 4) * d * d, 6);
    expect(Number(resistance)).toBeCloseTo(1e3 / (58 * (Math.PI / 4) * d * d), 6);
  });
});

describe('help', () => {
  it('of the program has the commands and the exit statuses', async () => {
    const { status, out, err } = await run(['--help']);
    expect([status, err]).toEqual([0, '']);
    for (const word of ['table', 'netlist', 'check', 'list', '130']) expect(out).toContain(word);
    expect(out).not.toContain('budget');
  });
  it.each(['table', 'netlist', 'check', 'list'])('of %s has an example that is right', async (command) => {
    const { status, out } = await run([command, '--help']);
    expect(status).toBe(0);
    const examples = [...out.matchAll(/^ {2}rimflow (.*)$/gm)].map(([, line]) => line);
    expect(examples.length).toBeGreaterThan(0);
    for (const line of examples) {
      const words = [...line.matchAll(/"([^"]*)"|(\S+)/g)].map(([, quoted, plain]) => quoted ?? plain);
      const argv = words.map((word) => (word === 'pump.yaml' ? 'pair.yaml' : word));
      const solve = argv[0] === 'netlist' ? smooth : undefined;
      expect((await run(argv, solve === undefined ? {} : { solve })).err).not.toMatch(/^[A-Z_]+ /);
    }
  });
  it('--version prints the version alone', async () => {
    expect((await run(['--version'])).out).toMatch(/^\d+\.\d+\.\d+\n$/);
  });
});

/** A loop of one section: R and L of 1 ohm + 1 uH + (1 ohm parallel 1 uH), a metre. */
async function smooth(c: Parameters<typeof tableOf>[0]) {
  const table = tableOf(c);
  table.frequency.forEach((f, i) => {
    const w = 2 * Math.PI * f * 1e-6;
    table.loops[0].resistance[i] = 1 + (w * w) / (1 + w * w);
    table.loops[0].inductance[i] = 1e-6 + 1e-6 / (1 + w * w);
  });
  return table;
}

describe('netlist', () => {
  it('of a loop that is one section finds that section, for the length, and takes its name from the file', async () => {
    const { status, out } = await run(['netlist', 'pair.yaml', '--sections', '1'], { solve: smooth });
    expect(status).toBe(0);
    const value = (element: string) =>
      Number(new RegExp(`^${element} \\w+ \\w+ (\\S+)$`, 'm').exec(out)?.[1]);
    expect(out).toContain('.subckt pair a1 b1\n');
    expect(value('Rdc')).toBe(2);
    for (const [element, expected] of [
      ['Linf', 2e-6],
      ['R1', 2],
      ['L1', 2e-6],
    ] as const) {
      expect(Math.abs(value(element) / expected - 1)).toBeLessThan(1e-6);
    }
    expect([value('Rextra'), value('Lextra')]).toEqual([1e-3, 1e-8]);
  });
  it('names the file to include, and the subcircuit as asked', async () => {
    const { written, err } = await run(['netlist', 'pair.yaml', '--out', 'some/run.cir', '--name', 'feed'], {
      solve: smooth,
    });
    expect(written.get('some/run.cir')).toMatch(/\.include run\.cir\n.*\.subckt feed a1 b1\n/s);
    expect(err).toBe('wrote some/run.cir (1 section)\n');
  });
  it('of several loops is not supported yet', async () => {
    const stdin = PAIR.replace('frequencies', '  back: { go: minus, return: plus }\nfrequencies');
    const { status, err } = await run(['netlist', '-'], { stdin });
    expect(status).toBe(2);
    expect(err).toMatch(/^NOT_SUPPORTED a netlist of 2 loops is not supported yet/);
  });
  it('of one frequency has no band: NO_FREQUENCIES, 2', async () => {
    const stdin = PAIR.replace('[50 Hz, 1 kHz, 1 MHz]', '[0 Hz, 50 Hz]');
    const { status, err } = await run(['netlist', '-'], { stdin });
    expect([status, err.split(' ')[0]]).toEqual([2, 'NO_FREQUENCIES']);
  });
});
