/** Version of the package, as results and netlists state it: that of package.json (test/house/package.test.ts). */
export const VERSION = '0.1.0';
