export { type NetlistInput, netlistText } from './netlist.ts';
export { safeSubcircuitName } from './netlist-text.ts';
