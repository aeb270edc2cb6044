import { describe, expect, it } from 'vitest';
import { element, escapeXml, textAt } from './svg.ts';

describe('SVG text', () => {
  it('lets no name of an uploaded table out of its element', () => {
    expect(textAt(1, 2, '</text><script>alert("x")</script>')).toBe(
      '<text x="1" y="2">&lt;/text&gt;&lt;script&gt;alert(&quot;x&quot;)&lt;/script&gt;</text>',
    );
    expect(element('g', { 'aria-label': '"><image href=x>' })).toBe('<g aria-label="&quot;&gt;&lt;image href=x&gt;"/>');
  });

  it('leaves out what XML 1.0 forbids even when escaped', () => {
    expect(escapeXml('a\u0000b\u001bc\ud800d\ufffee 😀')).toBe('abcde 😀');
  });

  it('leaves out attributes that are not given, and keeps zero', () => {
    expect(element('rect', { x: 0, y: undefined, width: 1.23456 })).toBe('<rect x="0" width="1.23"/>');
  });
});
