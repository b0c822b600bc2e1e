import { describe, expect, it } from 'vitest';
import { currentItem } from './current-item.js';

const items = [
  { label: 'Home', to: '/' },
  { label: 'Stations', to: '/stations' },
  { label: 'Requests', to: '/stations/requests' },
];

describe('the page with the hump', () => {
  it('is the longest item that begins the path by whole segments', () => {
    expect(currentItem(items, '/stations/requests/4127?tab=1')?.label).toBe('Requests');
    expect(currentItem(items, '/stations/tarnwick')?.label).toBe('Stations');
    expect(currentItem(items, '/stationsmaster')).toBeNull();
  });

  it('is home only at home', () => {
    expect(currentItem(items, '/')?.label).toBe('Home');
    expect(currentItem(items, '/unknown')).toBeNull();
  });
});
