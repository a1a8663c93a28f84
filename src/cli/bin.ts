#!/usr/bin/env node
import { main } from './main.ts';
import { nodeIo } from './node-io.ts';

// all output is written when main ends; what may still run is of no use any more
process.exit(await main(process.argv.slice(2), nodeIo()));
