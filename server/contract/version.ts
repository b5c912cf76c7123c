/** Version of the program, and so of the engine that judges; printed on every evaluation. The same as package.json's. */
export const VERSION = '0.1.0';
