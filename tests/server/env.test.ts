import { describe, expect, it } from 'vitest';
import { parseEnv } from '../../server/env';

const least = { DATABASE_URL: 'postgres://a:b@127.0.0.1/brimline', PUBLIC_URL: 'http://127.0.0.1:3100/' };

describe('parseEnv', () => {
  it('needs two settings and has a default for the rest', () => {
    expect(parseEnv(least)).toMatchObject({
      NODE_ENV: 'development',
      HOST: '127.0.0.1',
      PORT: 3100,
      PUBLIC_URL: 'http://127.0.0.1:3100',
      SESSION_IDLE_MINUTES: 15,
      SESSION_ABSOLUTE_HOURS: 12,
      LOCKOUT_TRIES: 5,
      LOCKOUT_MINUTES: 15,
      BESIDE_MINUTES: 10,
    });
  });

  it('takes an empty optional setting for absent', () => {
    expect(parseEnv({ ...least, SMTP_URL: '', DATABASE_OWNER_URL: '' })).toMatchObject({
      SMTP_URL: undefined,
    });
  });

  it.each([
    ['DATABASE_URL', undefined],
    ['DATABASE_URL', 'mysql://x'],
    ['PUBLIC_URL', 'ftp://x'],
    ['PORT', '3100x'],
    ['PORT', '70000'],
    ['PORT', ''],
    ['SESSION_IDLE_MINUTES', '0'],
    ['SESSION_IDLE_MINUTES', '1.5'],
    ['SMTP_URL', 'localhost:25'],
    ['NODE_ENV', 'staging'],
  ])('refuses %s=%s by name', (name, value) => {
    expect(() => parseEnv({ ...least, [name]: value })).toThrow(
      new RegExp(`^The settings are not usable:\\n  ${name}: `),
    );
  });

  it('names everything that is wrong at once', () => {
    expect(() => parseEnv({ PORT: 'x' })).toThrow(/PORT[\s\S]*DATABASE_URL[\s\S]*PUBLIC_URL/);
  });
});
