/**
 * Names that count as units, without their values: the gate before mathjs (which knows hundreds of others, such as
 * `drop` or `cup`, that stay free for `let`) and the words that a `let` name may not take.
 */
import { OWN_UNITS } from './units.ts';

const SHORT_PREFIXES = 'da h k M G T P E Z Y R Q d c m u n p f a z y r q'.split(' ');
const LONG_PREFIXES =
  'deca hecto kilo mega giga tera peta exa zetta yotta ronna quetta deci centi milli micro nano pico femto atto zepto yocto ronto quecto'.split(
    ' ',
  );
const SHORT_NAMES = 'm Hz s A V W N J F H S T Wb K rad ohm'.split(' ');
const LONG_NAMES =
  'meter meters hertz ampere amperes volt volts watt watts farad farads henry siemens tesla weber webers ohm ohms kelvin newton joule joules radian radians second seconds'.split(
    ' ',
  );
const BARE_NAMES =
  'in inch inches ft foot feet yd yard yards mi mile miles mil angstrom angstroms min minute minutes h hour hours sec amp amps deg degree degrees degC'.split(
    ' ',
  );

const withPrefixes = (prefixes: readonly string[], names: readonly string[]): string[] =>
  names.flatMap((name) => [name, ...prefixes.map((prefix) => prefix + name)]);

/** Every unit name that a file may use. */
export const UNIT_NAMES: ReadonlySet<string> = new Set([
  ...withPrefixes(SHORT_PREFIXES, SHORT_NAMES),
  ...withPrefixes(LONG_PREFIXES, LONG_NAMES),
  ...BARE_NAMES,
  ...OWN_UNITS.keys(),
]);

/** Those that messages may suggest: what people meant is never a yoctometre. */
export const USUAL_UNIT_NAMES: readonly string[] =
  'mm m cm um nm km in ft mil kcmil Hz kHz MHz GHz ohm mohm uohm nohm kohm H mH uH nH S MS K degC deg rad'.split(
    ' ',
  );
