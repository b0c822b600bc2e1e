import { describe, expect, it } from 'vitest';
import { atMinute, booking, detail } from './contact-fixture.js';
import { contactChart, readingsAt } from './contact-panels.js';

describe('the curves of a contact', () => {
  const chart = contactChart('W5', booking(), detail());

  it('share one axis that shows set-up and tear-down, and are empty outside the contact', () => {
    expect(chart.fromMs).toBeLessThan(atMinute(0));
    expect(chart.toMs).toBeGreaterThan(atMinute(12));
    expect(chart.phases?.map((phase) => phase.label)).toEqual(['Set-up', 'Contact', 'Tear-down']);
    expect(chart.panels.map((panel) => panel.title)).toEqual(['Elevation', 'Doppler', 'Link margin']);
    for (const panel of chart.panels) expect(panel.values[0]).toBeNaN();
  });

  it('leave out a margin that nothing could be computed for, and room below nought where it is negative', () => {
    const none = contactChart('W5', booking(), detail([]));
    expect(none.panels.map((panel) => panel.title)).not.toContain('Link margin');
    const thin = contactChart('W5', booking(), detail([-2.5, 4, 1]));
    expect(thin.panels.at(-1)?.minValue).toBe(-3);
  });
});

describe('present values in words', () => {
  it('tell the receiver’s frequency while the contact lasts', () => {
    const readings = readingsAt(detail(), atMinute(4));
    expect(readings['elevation']).toBe('36.9° now, 65.8° at 14:06:00');
    expect(readings['Data downlink doppler']).toBe('+25.0 kHz now, set receiver to 2214.0250 MHz');
    expect(readings['Data downlink margin']).toBe('9.5 dB now, least 3.0 dB');
  });

  it('tell the range of the contact before and after it', () => {
    const readings = readingsAt(detail(), atMinute(20));
    expect(readings['elevation']).toBe('highest 65.8° at 14:06:00');
    expect(readings['Data downlink doppler']).toBe('');
    expect(readings['Data downlink margin']).toBe('least 3.0 dB');
  });
});
