import { readFileSync, readdirSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { expectRelative } from './expectations';

// Every `@example` of the four folders is run: `call // value`, what follows a number and ` = ` is a remark. Numbers agree to 1e-14 of themselves.
const engine = new URL('../../../functions/engine/', import.meta.url);

for (const folder of ['numbers', 'coverage', 'evidence', 'report']) {
  describe(folder, async () => {
    const files = readdirSync(new URL(folder, engine)).filter((name) => name.endsWith('.ts'));
    for (const file of files) {
      const examples = [...readFileSync(new URL(`${folder}/${file}`, engine), 'utf8').matchAll(/@example +(.+) \/\/ (.+)/g)];
      if (examples.length === 0) continue;
      const module: Record<string, unknown> = await import(`../../../functions/engine/${folder}/${file.slice(0, -3)}.ts`);
      test.each(examples.map((found) => [found[1], found[2].replace(/^([-\d.e]+) = .*/, '$1')]))(`${file}: %s is %s`, (call, value) => {
        const run = (text: string): unknown => new Function(...Object.keys(module), `return (${text})`)(...Object.values(module));
        expectSame(run(call), run(value));
      });
    }
  });
}

function expectSame(actual: unknown, expected: unknown): void {
  if (typeof expected === 'number' && Number.isFinite(expected)) expectRelative(actual as number, expected, 1e-14);
  else if (typeof expected === 'object' && expected !== null) {
    expect(Object.keys(actual as object)).toEqual(Object.keys(expected));
    for (const [key, value] of Object.entries(expected)) expectSame((actual as Record<string, unknown>)[key], value);
  } else expect(actual).toBe(expected);
}
