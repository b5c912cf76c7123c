import { expect } from 'vitest';
import * as z from 'zod';
import { OPERATIONS, type Operation } from '../../server/contract/operations.ts';
import { problem } from '../../server/contract/problem.ts';

/** The operation an address belongs to; one without pieces of its own goes before one with. */
export function operationAt(method: string, address: string): Operation | undefined {
  const path = address.split('?')[0] ?? '';
  return (Object.values(OPERATIONS) as Operation[])
    .filter((one) => one.method === method.toLowerCase())
    .sort((a, b) => a.path.split('{').length - b.path.split('{').length)
    .find((one) => new RegExp(`^${one.path.replace(/\{\w+\}/g, '[^/]+')}$`).test(path));
}

/** Fails the test where an answer has a key more, a key less or another kind of value than the contract says. */
export function expectContractKept(method: string, address: string, status: number, body: unknown): void {
  const operation = operationAt(method, address);
  const what = `${method} ${address}`;
  if (status >= 400) {
    expectFits(problem, body, what);
  } else if (operation !== undefined && typeof operation.answer !== 'string') {
    expect(status, what).toBe(operation.status ?? 200);
    expectFits(operation.answer, body, what);
  }
}

function expectFits(schema: z.ZodType, body: unknown, what: string): void {
  const parsed = schema.safeParse(body);
  if (!parsed.success) throw new Error(`${what} does not keep the contract: ${z.prettifyError(parsed.error)}`);
  // What the schema does not know it leaves out.
  expect(body, what).toEqual(parsed.data);
}
