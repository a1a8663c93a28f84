/** Commands, their options and their help; the work itself is loaded when a command is known. */
import { Command, CommanderError, Option } from 'commander';
import { Problem } from '../problem.ts';
import { VERSION } from '../version.ts';
import { TABLE_FORMATS } from '../writers/index.ts';
import { EXIT_HELP } from './ending.ts';
import type { Io } from './io.ts';
import type { NetlistOptions } from './netlist-command.ts';
import type { CommonOptions, QuickOptions } from './options.ts';
import { print } from './output.ts';
import type { TableOptions } from './table-command.ts';

/** Commands of later versions. */
const LATER_COMMANDS = ['budget', 'sweep', 'draw'];

/** Options of later versions, by command. */
const LATER_OPTIONS: Readonly<Record<string, readonly string[]>> = { netlist: ['--form'] };

/** @returns exit status */
export async function runProgram(argv: readonly string[], io: Io): Promise<number> {
  let status = 0;
  const help = { text: '' };
  const program = new Command('rimflow')
    .description(
      'R(f) and L(f) of round conductors with skin and proximity effect, and circuit models of them',
    )
    .version(VERSION, '--version', 'print the version')
    .helpOption('-h, --help', 'print this help')
    .helpCommand(false)
    .exitOverride()
    .configureOutput({
      writeOut: (text) => {
        help.text += text;
      },
      // told by the error itself
      writeErr: () => undefined,
    })
    .addHelpText('after', () => `\n${exitHelp()}`);
  const end = (result: Promise<number>) =>
    result.then((value) => {
      status = value;
    });

  withQuickOptions(
    withCommonOptions(program.command('table'), TABLE_FORMATS)
      .summary('R(f), L(f) of each loop and the mutual terms')
      .description('R(f) and L(f) of each loop and the mutual terms, per metre or for the run.')
      .argument('[FILE]', 'cross-section file; - reads standard input')
      .option('--with-errors', 'columns with the stated relative errors')
      .option('--currents', 'columns with the current of each wire, for one ampere in the loop')
      .option('--total', 'values of the whole length, lumped parts included')
      .option('--detail', 'R dc, R/R dc, internal and external L, skin depths'),
  )
    .addHelpText(
      'after',
      example('rimflow table pump.yaml --out pump.csv', 'rimflow table --gauge "AWG 12" --spacing "4.1 mm"'),
    )
    .action((file: string | undefined, options: TableOptions) =>
      end(import('./table-command.ts').then(({ runTable }) => runTable(file, options, io))),
    );

  withQuickOptions(
    withCommonOptions(program.command('netlist'), ['spice'])
      .summary('a subcircuit of one loop for a SPICE-type simulator')
      .description(
        'A subcircuit of resistors and inductors for the length of the run, over the band of its frequencies. For cases of one loop.',
      )
      .argument('[FILE]', 'cross-section file; - reads standard input')
      .option('--sections <N>', 'number of sections')
      .option('--within <ERROR>', 'the fewest sections within this error of R and L (default: 1%)')
      .option('--name <NAME>', 'name of the subcircuit (default: that of the file)')
      .addOption(new Option('--form <FORM>').hideHelp()),
  )
    .addHelpText('after', example('rimflow netlist pump.yaml --within 0.5% --out pump.cir'))
    .action((file: string | undefined, options: NetlistOptions) =>
      end(import('./netlist-command.ts').then(({ runNetlist }) => runNetlist(file, options, io))),
    );

  withQuickOptions(
    withCommonOptions(program.command('check'), ['text', 'json'])
      .summary('what was understood, and every problem; computes nothing')
      .description('Reads a file, prints what was understood of it and every problem; computes nothing.')
      .argument('[FILE]', 'cross-section file; - reads standard input'),
  )
    .addHelpText('after', example('rimflow check pump.yaml --set "gap=2 mm"'))
    .action((file: string | undefined, options: CommonOptions & QuickOptions) =>
      end(import('./check-command.ts').then(({ runCheck }) => runCheck(file, options, io))),
    );

  withOutputOptions(program.command('list'), TABLE_FORMATS)
    .summary('built-in sizes and metals, each with its source')
    .description('Built-in wire sizes or materials, each with its source.')
    .argument('<what>', 'wires or materials')
    .addHelpText('after', example('rimflow list materials', 'rimflow list wires --format csv'))
    .action((what: string, options: CommonOptions) =>
      end(import('./list-command.ts').then(({ runList }) => runList(what, options, io))),
    );

  for (const name of LATER_COMMANDS) {
    program
      .command(name, { hidden: true })
      .allowUnknownOption()
      .helpOption(false)
      .argument('[anything...]')
      .action(() => {
        throw new Problem('NOT_SUPPORTED', `the command "${name}" is not supported yet; see rimflow --help`);
      });
  }

  refuseLaterOptions(argv);
  if (argv.length === 0) {
    throw new Problem('USAGE', 'no command; one of table, netlist, check, list (see rimflow --help)');
  }
  try {
    await program.parseAsync(argv, { from: 'user' });
  } catch (error) {
    if (!(error instanceof CommanderError)) throw error;
    if (error.exitCode !== 0) throw usageProblem(error, argv);
    await print(help.text, io);
  }
  return status;
}

function withOutputOptions(command: Command, formats: readonly string[]): Command {
  return command
    .addOption(new Option('--format <FORMAT>', 'form of the result').choices(formats))
    .option('--out <PATH>', 'write the result to this file, whole or not at all')
    .option('--quiet', 'no progress, no notes');
}

function withCommonOptions(command: Command, formats: readonly string[]): Command {
  return withOutputOptions(command, formats)
    .option(
      '--set <NAME=VALUE>',
      'another value for a let name; may stand several times',
      (value: string, before: string[] | undefined) => [...(before ?? []), value],
    )
    .option('--fail-on-caution', 'exit status 1 when there is a caution');
}

/** A go and return pair without a file. */
function withQuickOptions(command: Command): Command {
  return command
    .optionsGroup('A go and return pair without a file:')
    .option('--gauge <SIZE>', 'size of both wires, such as "AWG 12"')
    .option('--diameter <LENGTH>', 'or their diameter, such as "2 mm"')
    .option('--spacing <LENGTH>', 'distance of their centres')
    .option('--material <NAME>', 'metal (default: copper)')
    .option('--temperature <T>', 'of the metal (default: 20 °C)')
    .option('--insulation <LENGTH>', 'its thickness')
    .option('--length <LENGTH>', 'length of the run')
    .option('--from <FREQUENCY>', 'lowest frequency (default: 10 Hz)')
    .option('--to <FREQUENCY>', 'highest frequency, 10 points a decade (default: 100 MHz)')
    .option('--tolerance <ERROR>', 'wanted relative error (default: 1e-8)');
}

function example(...lines: string[]): string {
  return `\nExample${lines.length > 1 ? 's' : ''}:\n${lines.map((line) => `  ${line}\n`).join('')}`;
}

function exitHelp(): string {
  return `Exit status:\n${EXIT_HELP.map(([code, text]) => `  ${String(code).padEnd(5)}${text}\n`).join('')}`;
}

function refuseLaterOptions(argv: readonly string[]): void {
  for (const option of LATER_OPTIONS[argv[0]] ?? []) {
    if (argv.some((word) => word === option || word.startsWith(`${option}=`))) {
      throw new Problem('NOT_SUPPORTED', `the option ${option} is not supported yet; leave it out`);
    }
  }
}

/** The words of the parser of options, with a code and where to look. */
function usageProblem(error: CommanderError, argv: readonly string[]): Problem {
  const text = error.message
    .replace(/^error: /, '')
    .replace(/\n\(Did you mean (.*)\?\)$/, ' (did you mean $1?)')
    .replaceAll("'", '"')
    .replace(/\.$/, '');
  const command = ['table', 'netlist', 'check', 'list'].find((name) => name === argv[0]);
  return new Problem('USAGE', `${text}; see rimflow ${command === undefined ? '' : `${command} `}--help`);
}
