import { describe, expect, it } from 'vitest';
import { afterSignIn } from './after-sign-in.js';

describe('the page after the sign-in', () => {
  it.each(['//evil.example', 'https://evil.example', '/\\evil.example', 'javascript:alert(1)', '', null])(
    'never leaves the site for %s',
    (then) => {
      expect(afterSignIn(then)).toBe('/');
    },
  );
  it('is the page that was asked for', () => {
    expect(afterSignIn('/bookings?state=held')).toBe('/bookings?state=held');
  });
});
