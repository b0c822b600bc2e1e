import { describe, expect, it } from 'vitest';
import { escapeHtml, mailBody } from './mail-body.js';

describe('a mail', () => {
  it('shows what people typed as they typed it', () => {
    const { text, html } = mailBody({
      title: 'Tom & <Jerry>',
      paragraphs: ['<script>alert("x")</script>'],
      facts: [['Station', `O'Hare "North"`]],
      action: { label: 'Open', url: 'https://skyberth.example/?a=1&b="2"' },
    });
    expect(html).not.toContain('<script>');
    expect(html).toContain('Tom &amp; &lt;Jerry&gt;');
    expect(html).toContain('O&#39;Hare &quot;North&quot;');
    expect(html).toContain('href="https://skyberth.example/?a=1&amp;b=&quot;2&quot;"');
    expect(text).toContain('<script>alert("x")</script>');
    expect(text).toContain('https://skyberth.example/?a=1&b="2"');
  });

  it('leaves out the parts that are not there', () => {
    expect(mailBody({ title: 'T', paragraphs: ['P'] }).text).toBe('T\n\nP\n');
  });

  it('escapes each mark once', () => {
    expect(escapeHtml(`<&>"'`)).toBe('&lt;&amp;&gt;&quot;&#39;');
  });
});
