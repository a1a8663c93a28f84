/**
 * The shape of a cross-section file as a zod schema: keys, kinds, descriptions and examples. Units, names and physics
 * are read after it. `case.schema.json` (for editors) is made from it by `node scripts/schema.mjs`.
 */
import { z } from 'zod';
import { FAMILIES, type Family } from './families.ts';

/** Metadata key under which a quantity carries its family into the JSON Schema. */
export const FAMILY_KEY = 'x-rimflow-quantity';

const NAME = '^[A-Za-z0-9_-]+$';
const LET_NAME = '^[A-Za-z_][A-Za-z0-9_]*$';

function quantity(family: Family, description: string, ...examples: (string | number)[]) {
  const { name, example } = FAMILIES[family];
  const error = `expected ${name} such as ${example}, or a let name`;
  return z.union([z.string(), z.number()], { error }).meta({
    description,
    examples: examples.length > 0 ? examples : [example],
    [FAMILY_KEY]: family,
  });
}

function text(expected: string, description: string, ...examples: string[]) {
  return z.union([z.string(), z.number()], { error: `expected ${expected}` }).meta({ description, examples });
}

function flag(description: string) {
  return z
    .union([z.boolean(), z.string()], {
      error: 'expected true, false or a let name',
    })
    .meta({ description });
}

/** `names` is the pattern of its keys, for editors; the program checks them apart, to say more. */
function record<T extends z.ZodType>(value: T, expected: string, description: string, names = NAME) {
  const propertyNames = { type: 'string', pattern: names };
  return z.record(z.string(), value, { error: `expected ${expected}` }).meta({ description, propertyNames });
}

const name = (description: string, ...examples: string[]) => text('a name', description, ...examples);

/** Shape of `at`. */
const at = z
  .union(
    [
      z.tuple(
        [quantity('length', 'x of the centre', '2 mm'), quantity('length', 'y of the centre', '3 mm')],
        {
          error: 'expected two coordinates such as [0 mm, 2.5 mm]; a comma ends a value',
        },
      ),
      z.strictObject({
        from: name('The wire whose centre is the origin', 'plus'),
        distance: quantity('length', 'Distance of the centres', '5 mm').optional(),
        angle: quantity(
          'angle',
          'Direction from there, counter-clockwise from x; default 0°',
          '60°',
        ).optional(),
        touching: flag(
          'Stand insulation to insulation (bare metal: at the smallest gap), in place of a distance',
        ).optional(),
      }),
    ],
    {
      error: 'expected [x, y], or { from, distance, angle }, or { from, angle, touching: true }',
    },
  )
  .meta({
    description: 'Centre of the wire',
    examples: [['0 mm', '2 mm'], { from: 'plus', distance: '5 mm' }],
  });

const wire = z
  .strictObject(
    {
      diameter: quantity('length', 'Diameter of the metal', '2.05 mm').optional(),
      radius: quantity('length', 'Radius of the metal', '1 mm').optional(),
      area: quantity('area', 'Cross-section of the metal', '1.5 mm²', '250 kcmil').optional(),
      gauge: text('a gauge such as AWG 12 or SWG 20', 'Wire size', 'AWG 12', 'AWG 2/0', 'SWG 20').optional(),
      stranded: text(
        'an area or a gauge such as 35 mm² or AWG 2',
        'Metal area of a compact strand, taken as one round wire of the given diameter with that resistance',
        '35 mm²',
        'AWG 2',
      ).optional(),
      resistance: text(
        'a resistance per length such as 0.554 ohm/km at 20 °C',
        'Measured or catalogue resistance per length, and the temperature where it holds',
        '0.554 ohm/km at 20 °C',
      ).optional(),
      material: name('Built-in metal or one of `materials`; default copper', 'aluminium').optional(),
      temperature: quantity('temperature', 'Temperature of this wire', '75 °C').optional(),
      insulation: quantity('length', 'Thickness of the insulation; default none', '0.8 mm').optional(),
      at,
    },
    { error: 'expected a wire such as { diameter: 2 mm, at: [0 mm, 0 mm] }' },
  )
  .meta({
    description: 'A solid round conductor: exactly one of diameter, radius, area, gauge',
  });

const material = z
  .strictObject(
    {
      conductivity: quantity(
        'conductivity',
        'Conductivity at the reference temperature',
        '55 MS/m',
      ).optional(),
      resistivity: quantity('resistivity', 'Or its resistivity', '17.2 nohm m').optional(),
      temperature_coefficient: quantity(
        'temperatureCoefficient',
        'Relative rise of resistivity per kelvin at the reference temperature; default 0',
        '0.0039 1/K',
      ).optional(),
      reference_temperature: quantity('temperature', 'Default 20 °C', '20 °C').optional(),
      relative_permeability: quantity('number', 'At least 1; default 1', 1, 100).optional(),
    },
    { error: 'expected a material such as { conductivity: 55 MS/m }' },
  )
  .meta({
    description: 'A metal: exactly one of conductivity and resistivity',
  });

const wireList = z
  .union(
    [z.string(), z.number(), z.array(z.union([z.string(), z.number()], { error: 'expected a wire name' }))],
    {
      error: 'expected a wire name or a list of them',
    },
  )
  .meta({ examples: ['plus', ['minus', 'drain']] });

const loop = z
  .strictObject(
    {
      go: wireList,
      return: wireList,
      series: flag(
        'The members carry the same current one after the other; default: they are bonded',
      ).optional(),
      extra: z
        .strictObject(
          {
            resistance: quantity('resistance', 'Of lugs and contacts', '2 mohm').optional(),
            inductance: quantity('inductance', 'Of lugs and contacts', '15 nH').optional(),
          },
          { error: 'expected { resistance: 2 mohm, inductance: 15 nH }' },
        )
        .meta({
          description: 'Lumped parts, added once to the total of the run',
        })
        .optional(),
    },
    { error: 'expected a loop such as { go: plus, return: minus }' },
  )
  .meta({
    description: 'Current goes in the wires of `go` and comes back in those of `return`',
  });

const frequencies = z
  .union(
    [
      z.array(quantity('frequency', 'A frequency', '50 Hz')),
      z.strictObject({
        from: quantity('frequency', 'First frequency', '10 Hz'),
        to: quantity('frequency', 'Last frequency', '10 MHz'),
        per_decade: quantity('number', 'Points a decade of a log range; default 10', 10).optional(),
        count: quantity('number', 'Number of points, both ends among them', 61).optional(),
        scale: z
          .union([z.enum(['log', 'linear']), z.string()], {
            error: 'expected log or linear',
          })
          .meta({ description: 'log (default) or linear' })
          .optional(),
      }),
    ],
    {
      error: 'expected a list such as [50 Hz, 1 kHz] or a range such as { from: 10 Hz, to: 10 MHz }',
    },
  )
  .meta({
    description: 'Frequencies of the table',
    examples: [{ from: '10 Hz', to: '10 MHz', per_decade: 10 }, ['50 Hz', '1 kHz']],
  });

const letValue = z.union([z.string(), z.number(), z.boolean()], {
  error: 'expected a quantity or a word, such as 0.4 mm or copper',
});

/** The whole file. */
export const caseSchema = z
  .strictObject(
    {
      rimflow: z.literal(1).meta({ description: 'Version of this format' }),
      title: text('a line of text', 'Title of results', 'Pump inverter to motor, flat pair').optional(),
      let: record(letValue, 'a map of names to values', 'Names for quantities or words', LET_NAME).optional(),
      temperature: quantity('temperature', 'Of every wire that says nothing else; default 20 °C').optional(),
      length: quantity(
        'length',
        'Length of the run; without it results are per metre only',
        '12 m',
      ).optional(),
      materials: record(
        material,
        'a map of names to materials',
        'Own metals beside the built-in ones',
      ).optional(),
      wires: record(wire, 'a map of names to wires', 'Name -> wire'),
      loops: record(loop, 'a map of names to loops', 'Name -> loop'),
      bonded: z
        .array(
          z.array(
            z.union([z.string(), z.number()], {
              error: 'expected a wire name',
            }),
            {
              error: 'expected a list of wire names',
            },
          ),
          {
            error: 'expected a list of lists of wire names, such as [[pipe, drain]]',
          },
        )
        .meta({
          description: 'Wires joined at both ends but in no loop',
          examples: [[['pipe', 'drain']]],
        })
        .optional(),
      frequencies,
      tolerance: quantity('number', 'Wanted relative error of R and of L; default 1e-8', 1e-8).optional(),
    },
    {
      error: 'expected a map with the keys rimflow, wires, loops and frequencies',
    },
  )
  .meta({
    title: 'rimflow cross-section',
    description: 'A cross-section of round conductors, format 1',
  });
