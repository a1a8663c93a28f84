/**
 * Bounds of a cross-section file. A hostile or mistaken file must end in a clear line, not in a wait; each bound
 * is far above what a drawing of conductors needs.
 */

/** [bytes] largest file; also the largest text in UTF-16 units. */
export const MAX_FILE_BYTES = 10_000_000;

/** Lexical tokens of the YAML text: 2000 wires take about 80 000; reading 500 000 takes one to two seconds. */
export const MAX_TOKENS = 500_000;

/** Levels of nesting; a case needs five. Also keeps every recursive reader off the end of the stack. */
export const MAX_DEPTH = 40;

/** Values after aliases are replaced by what they stand for. */
export const MAX_VALUES = 250_000;

/** `let` names of one file. */
export const MAX_LET_NAMES = 1000;

/** Characters of one expression. */
export const MAX_EXPRESSION_LENGTH = 500;

/** Numbers, names and signs of one expression. */
export const MAX_EXPRESSION_TOKENS = 200;

/** Open parentheses in one expression. */
export const MAX_PARENTHESES = 32;

/** Magnitude of an exponent in an expression. */
export const MAX_EXPONENT = 64;

/** Characters of a name of a wire, loop, material or `let`; a netlist line stays below 80. */
export const MAX_NAME_LENGTH = 64;

/** Characters of a title. */
export const MAX_TITLE_LENGTH = 500;

/** Wires of one case: beyond, the pairwise tables of the solver do not fit in memory. */
export const MAX_WIRES = 2000;

/** Frequencies of one case. */
export const MAX_FREQUENCIES = 100_000;

/** Unknown names of one file for which the nearest known one is looked up: each look-up walks all names. */
export const MAX_SUGGESTIONS = 20;

/** Problems listed for one file; a last line counts the others. */
export const MAX_PROBLEMS = 200;
