import { describe, expect, test } from 'vitest';
import { allowedOrigins, EnvError, publicOrigin, readStartEnv } from '#server/env.ts';

const SECRET = 'x'.repeat(32);

describe('a wrong value is named', () => {
  test.each([
    [{ PORT: 'abc' }, 'PORT must be a whole number from 1 to 65535 (it is "abc")'],
    [{ PORT: '0' }, 'PORT must be a whole number from 1 to 65535 (it is "0")'],
    [{ PORT: '65536' }, 'PORT must be a whole number from 1 to 65535 (it is "65536")'],
    [{ PORT: '80.5' }, 'PORT must be a whole number from 1 to 65535 (it is "80.5")'],
    [{ HOST: 'a b' }, 'HOST must be a host name or an IP address (it is "a b")'],
    [{ SPINWARD_DEMO: 'yes' }, 'SPINWARD_DEMO must be 0 or 1 (it is "yes")'],
    [{ SPINWARD_OPEN_SIGNUP: '2' }, 'SPINWARD_OPEN_SIGNUP must be 0 or 1 (it is "2")'],
    [{ SMTP_URL: 'http://mail.example' }, 'SMTP_URL must be an address that begins with smtp:// or smtps://'],
    [{ MAIL_FROM: 'nobody' }, 'MAIL_FROM must hold a mail address (it is "nobody")'],
    [{ BETTER_AUTH_SECRET: 'short' }, 'BETTER_AUTH_SECRET must have at least 32 characters'],
    [
      { DATABASE_URL: 'mysql://h/d', BETTER_AUTH_SECRET: SECRET },
      'DATABASE_URL must be an address that begins with postgres://',
    ],
    [
      { DATABASE_URL: 'postgres://h/d' },
      'BETTER_AUTH_SECRET must be set where DATABASE_URL is: sessions have to outlive this machine',
    ],
    [
      { SPINWARD_ORIGIN: 'https://a.example/path' },
      'SPINWARD_ORIGIN must be scheme, host and port alone, such as https://spinward.example.org (it is "https://a.example/path")',
    ],
  ])('%j', (source, message) => {
    expect(() => readStartEnv(source)).toThrow(new EnvError(message));
  });

  test('all of them at once, a line each, and secrets never shown', () => {
    const source = { PORT: 'abc', BETTER_AUTH_SECRET: 'hunter2', DATABASE_URL: 'hunter2' };
    try {
      readStartEnv(source);
      expect.unreachable();
    } catch (error) {
      const { message } = error as EnvError;
      expect(message.split('\n').map((line) => line.split(' ')[0])).toEqual([
        'PORT',
        'DATABASE_URL',
        'BETTER_AUTH_SECRET',
      ]);
      expect(message).not.toContain('hunter2');
    }
  });
});

test('nothing set, or set to nothing, gives the defaults of README.md', () => {
  const defaults = { PORT: 4321, HOST: '127.0.0.1', SPINWARD_DATA: '.data', SPINWARD_TRUST_PROXY: false };
  expect(readStartEnv({})).toMatchObject(defaults);
  expect(readStartEnv({ PORT: '', HOST: '', SPINWARD_DATA: '', SPINWARD_TRUST_PROXY: '' })).toMatchObject(
    defaults,
  );
  expect(readStartEnv({}).SPINWARD_DEMO).toBeUndefined();
});

test('the public address is SPINWARD_ORIGIN, else where the server listens', () => {
  expect(publicOrigin(readStartEnv({}))).toBe('http://127.0.0.1:4321');
  expect(publicOrigin(readStartEnv({ HOST: '::1', PORT: '80' }))).toBe('http://[::1]');
  expect(publicOrigin(readStartEnv({ HOST: '0.0.0.0' }))).toBe('http://localhost:4321');
  expect(publicOrigin(readStartEnv({ SPINWARD_ORIGIN: 'https://s.example/' }))).toBe('https://s.example');
});

test('a browser may come from the public address, this machine, and the address listened on', () => {
  expect(allowedOrigins(readStartEnv({ SPINWARD_ORIGIN: 'https://s.example', HOST: '192.0.2.7' }))).toEqual([
    'https://s.example',
    'http://localhost:4321',
    'http://127.0.0.1:4321',
    'http://[::1]:4321',
    'http://192.0.2.7:4321',
  ]);
});
