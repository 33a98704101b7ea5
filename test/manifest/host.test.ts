import { execFile } from 'node:child_process';
import { mkdtempSync, readFileSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, test } from 'vitest';
import { hostAddress } from '../../manifest/hostAddress';
import { manifestFiles } from '../../manifest/manifestFiles';
import { manifestVersion } from '../../manifest/manifestVersion';

describe('hostAddress', () => {
  test('takes https addresses, with port and path, and cuts the slash at the end', () => {
    expect(hostAddress('https://localhost:3000')).toBe('https://localhost:3000');
    expect(hostAddress('https://lab.example/')).toBe('https://lab.example');
    expect(hostAddress('https://lab.example/rootsum//')).toBe('https://lab.example/rootsum');
    expect(hostAddress('HTTPS://Lab.Example:443/A')).toBe('https://lab.example/A');
    expect(hostAddress('https://[::1]:3000/')).toBe('https://[::1]:3000');
  });
  test('refuses everything else, and says what it got', () => {
    const others = ['', 'http://lab.example', 'lab.example', 'https://', 'https:///x', 'https:lab.example', 'https://:3000', 'https:// lab', 'file:///x'];
    for (const text of others)
      expect(() => hostAddress(text), text).toThrow(`ROOTSUM_HOST needs an https address with a host, got ${JSON.stringify(text)}`);
    for (const text of ['https://a:b@lab.example', 'https://lab.example/?x=1', 'https://lab.example/#x', 'https://lab.example/?'])
      expect(() => hostAddress(text), text).toThrow('ROOTSUM_HOST needs an address without user, query and fragment');
  });
});

describe('manifestVersion', () => {
  test('gives four numbers, never below 1.0 and never going back', () => {
    expect(['0.1.0', '0.1.9', '0.2.0', '0.12.0', '1.0.0', '2.0.1'].map(manifestVersion)).toEqual(
      ['1.1.0.0', '1.1.9.0', '1.2.0.0', '1.12.0.0', '2.0.0.0', '3.0.1.0'],
    );
  });
  test('refuses versions that are not three numbers', () => {
    for (const version of ['1.0', '1.0.0-beta', '1.0.0.0', 'v1.0.0', '', '1.123456.0'])
      expect(() => manifestVersion(version), version).toThrow('three numbers');
  });
});

describe('the host address', () => {
  test('stands in every address of both manifests', () => {
    const files = manifestFiles('https://lab.example/rootsum/');
    for (const name of ['manifest.xml', 'manifest.json']) {
      const text = files.get(name) as string;
      expect(text).not.toContain('localhost');
      const addresses = [...text.matchAll(/https:\/\/[^"<]+/g)].map(([found]) => found).filter((found) => !/microsoft\.com/.test(found));
      expect(addresses.length).toBeGreaterThan(5);
      for (const address of addresses) expect(address).toMatch(/^https:\/\/lab\.example\/rootsum\/[a-z]/);
    }
    expect(JSON.parse(files.get('manifest.json') as string).validDomains).toEqual(['lab.example']);
  });
});

describe('writeManifest', () => {
  const root = fileURLToPath(new URL('../..', import.meta.url));
  const run = (folder: string, host?: string) =>
    new Promise<{ code: number | null; stderr: string }>((resolve) => {
      const env = { ...process.env, ROOTSUM_HOST: host };
      const args = ['--import', 'tsx', join(root, 'manifest/writeManifest.ts'), folder];
      const child = execFile(process.execPath, args, { cwd: root, env }, (_error, _out, stderr) =>
        resolve({ code: child.exitCode, stderr }),
      );
    });
  const inFolder = async (body: (folder: string) => Promise<void>) => {
    const folder = mkdtempSync(join(tmpdir(), 'rootsum-manifest-'));
    try {
      await body(folder);
    } finally {
      rmSync(folder, { recursive: true });
    }
  };

  test('writes every file, for the host of the environment', () =>
    inFolder(async (folder) => {
      expect(await run(folder, 'https://lab.example/')).toEqual({ code: 0, stderr: '' });
      for (const [name, content] of manifestFiles('https://lab.example'))
        expect(readFileSync(join(folder, name)).equals(Buffer.from(content)), name).toBe(true);
    }));
  test('writes for the own machine if the environment names none', () =>
    inFolder(async (folder) => {
      expect((await run(folder)).code).toBe(0);
      expect(readFileSync(join(folder, 'manifest.xml'), 'utf8')).toContain('https://localhost:3000/taskpane.html');
    }));
  test('writes nothing and says why if the host is no https address', () =>
    inFolder(async (folder) => {
      const stderr = 'ROOTSUM_HOST needs an https address with a host, got "http://lab.example"\n';
      expect(await run(folder, 'http://lab.example')).toEqual({ code: 1, stderr });
      expect(readdirSync(folder)).toEqual([]);
    }));
});
