import { describe, expect, it } from 'vitest';
import { attachmentType } from './attachment-type.ts';

const ascii = (text: string) => new TextEncoder().encode(text);

describe('the kind of an attachment', () => {
  it('is told by the first bytes, whatever the name says', () => {
    expect(attachmentType(Uint8Array.of(0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a, 0), 'a.txt')).toBe('image/png');
    expect(attachmentType(Uint8Array.of(0xff, 0xd8, 0xff, 0xe0), 'a')).toBe('image/jpeg');
    expect(attachmentType(ascii('%PDF-1.7\n'), 'a')).toBe('application/pdf');
    expect(attachmentType(ascii('SIMPLE  =                    T'), 'cutout.fits')).toBe('application/fits');
    expect(attachmentType(ascii('ra,dec\n1,2\n'), 'a.CSV')).toBe('text/csv');
    expect(attachmentType(ascii('<html>'), 'a.png')).toBe('text/plain');
  });

  it('is text with its last character cut, but not with a broken one in the middle', () => {
    expect(attachmentType(ascii('é').slice(0, 1), 'a')).toBe('text/plain');
    expect(attachmentType(Uint8Array.of(0x61, 0xc3, 0x61), 'a')).toBeUndefined();
  });

  it('is none for programs, archives and nothing at all', () => {
    expect(attachmentType(Uint8Array.of(0x7f, 0x45, 0x4c, 0x46, 2, 1), 'a.png')).toBeUndefined();
    expect(attachmentType(Uint8Array.of(0x50, 0x4b, 3, 4), 'a.csv')).toBeUndefined();
    expect(attachmentType(new Uint8Array(), 'a.txt')).toBeUndefined();
  });
});
