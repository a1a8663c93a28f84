/** The functions that an expression may call, with what they take and give. */
import { DIMENSIONLESS, type Dimension, FAMILIES, sameDimension } from './families.ts';
import { Fault } from './fault.ts';
import type { Quantity } from './quantity.ts';

type Call = (args: readonly Quantity[], name: string) => Quantity;

const RADIAN = FAMILIES.angle.dimension;

const plain = (value: number, dimension: Dimension): Quantity => ({
  value,
  dimension,
  celsius: false,
});

function only(args: readonly Quantity[], name: string): Quantity {
  if (args.length !== 1) throw new Fault('EXPRESSION', `${name}() takes one value, found ${args.length}`);
  return args[0]!;
}

/** A number in, a number of the given dimension out. */
function ofNumber(f: (x: number) => number, out: Dimension): Call {
  return (args, name) => {
    const x = only(args, name);
    if (!sameDimension(x.dimension, DIMENSIONLESS)) {
      throw new Fault('UNIT', `${name}() takes a number without a unit; divide by one, such as x / 1 mm`);
    }
    return plain(f(x.value), out);
  };
}

/** An angle, or a number of radians, in; a number out. */
function ofAngle(f: (x: number) => number): Call {
  return (args, name) => {
    const x = only(args, name);
    if (!sameDimension(x.dimension, RADIAN) && !sameDimension(x.dimension, DIMENSIONLESS)) {
      throw new Fault('UNIT', `${name}() takes an angle, such as 60°`);
    }
    return plain(f(x.value), DIMENSIONLESS);
  };
}

function extreme(pick: (...values: number[]) => number): Call {
  return (args, name) => {
    const first = args[0];
    if (first === undefined) throw new Fault('EXPRESSION', `${name}() takes at least one value`);
    if (args.some((x) => !sameDimension(x.dimension, first.dimension) || x.celsius !== first.celsius)) {
      throw new Fault('UNIT', `${name}() takes values of one kind`);
    }
    return { ...first, value: pick(...args.map((x) => x.value)) };
  };
}

const squareRoot: Call = (args, name) => {
  const x = only(args, name);
  return plain(Math.sqrt(x.value), x.dimension.map((e) => e / 2) as unknown as Dimension);
};

const magnitude: Call = (args, name) => {
  const x = only(args, name);
  return { ...x, value: Math.abs(x.value) };
};

/** A map, not an object: no name can reach what every object inherits. */
export const FUNCTIONS: ReadonlyMap<string, Call> = new Map<string, Call>([
  ['sqrt', squareRoot],
  ['abs', magnitude],
  ['min', extreme(Math.min)],
  ['max', extreme(Math.max)],
  ['sin', ofAngle(Math.sin)],
  ['cos', ofAngle(Math.cos)],
  ['tan', ofAngle(Math.tan)],
  ['asin', ofNumber(Math.asin, RADIAN)],
  ['acos', ofNumber(Math.acos, RADIAN)],
  ['atan', ofNumber(Math.atan, RADIAN)],
  ['exp', ofNumber(Math.exp, DIMENSIONLESS)],
  ['log', ofNumber(Math.log, DIMENSIONLESS)],
  ['log10', ofNumber(Math.log10, DIMENSIONLESS)],
]);
