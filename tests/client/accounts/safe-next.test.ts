import { describe, expect, it } from 'vitest';
import { safeNext } from '@/features/accounts/components/sign-in-page';

describe('where sign-in leads', () => {
  it.each([
    ['/checks/3f0c', '/checks/3f0c'],
    ['/wards/1?x=2', '/wards/1?x=2'],
    [null, '/'],
    ['', '/'],
    ['https://elsewhere.example', '/'],
    ['//elsewhere.example', '/'],
    ['/\\elsewhere.example', '/'],
    ['javascript:alert(1)', '/'],
  ])('%s leads to %s', (next, path) => {
    expect(safeNext(next)).toBe(path);
  });
});
