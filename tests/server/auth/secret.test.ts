import { mkdtempSync, readdirSync, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { readOrMakeSecret } from '../../../server/auth/secret.ts';
import { readConfig } from '../../../server/config.ts';

const folder = mkdtempSync(path.join(tmpdir(), 'tallyroot-secret-'));
afterAll(() => rmSync(folder, { recursive: true }));

describe('secret of the sessions', () => {
  it('is made once, in a file that only its owner can read', () => {
    const made = readOrMakeSecret(folder);
    expect(made.length).toBeGreaterThanOrEqual(43); // 32 random bytes
    expect(readOrMakeSecret(folder)).toBe(made);
    expect(readdirSync(folder)).toEqual(['auth-secret']);
    expect(statSync(path.join(folder, 'auth-secret')).mode & 0o777).toBe(0o600);
  });

  it('is taken from the environment where it is given, and refused where it is short', () => {
    const given = 'x'.repeat(40);
    expect(readOrMakeSecret(path.join(folder, 'nowhere'), given)).toBe(given);
    expect(() => readOrMakeSecret(folder, 'short')).toThrow(/shorter than 32/);
    expect(() => readConfig({ AUTH_SECRET: 'short' })).toThrow(/AUTH_SECRET/);
  });
});

describe('configuration', () => {
  it('has neither the demo nor open sign-up where others come by, unless somebody says so', () => {
    expect(readConfig({})).toMatchObject({ hasDemo: true, signUp: 'open', isSecure: false });
    expect(readConfig({ HOST: '0.0.0.0' })).toMatchObject({ hasDemo: false, signUp: 'invited' });
    expect(readConfig({ HOST: '0.0.0.0', DEMO: 'on' }).hasDemo).toBe(true);
    expect(readConfig({ DEMO: 'off' }).hasDemo).toBe(false);
  });

  it('takes https in the public address for secure cookies, and its name for an allowed host', () => {
    const config = readConfig({ PUBLIC_ADDRESS: 'https://tally.example/' });
    expect(config).toMatchObject({ isSecure: true, publicAddress: 'https://tally.example' });
    expect(config.allowedHosts).toEqual(['tally.example']);
  });
});
