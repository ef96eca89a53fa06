import { describe, expect, it } from 'vitest'
import { decodeBytes } from '#shared/readings/decode.ts'

const utf8 = (text: string) => new TextEncoder().encode(text)
const utf16 = (text: string, order: 'le' | 'be', mark: boolean) => {
  const codes = [...(mark ? [0xfeff] : []), ...[...text].map((letter) => letter.charCodeAt(0))]
  return Uint8Array.from(codes.flatMap((code) => (order === 'le' ? [code & 255, code >> 8] : [code >> 8, code & 255])))
}
const log = 'Zeit;Tiefe für Brunnen\n1;2,5\n'

describe('decodeBytes', () => {
  it.each([
    ['UTF-8', utf8(log), 'utf-8'],
    ['UTF-8 with a mark', Uint8Array.from([0xef, 0xbb, 0xbf, ...utf8(log)]), 'utf-8'],
    ['UTF-16 little endian with a mark', utf16(log, 'le', true), 'utf-16le'],
    ['UTF-16 big endian with a mark', utf16(log, 'be', true), 'utf-16be'],
    ['UTF-16 little endian without a mark', utf16(log, 'le', false), 'utf-16le'],
    ['UTF-16 big endian without a mark', utf16(log, 'be', false), 'utf-16be'],
    ['Latin-1', Uint8Array.from([...log].map((letter) => letter.charCodeAt(0))), 'windows-1252'],
  ])('reads %s', (_name, bytes, encoding) => {
    expect(decodeBytes(bytes)).toEqual({ ok: true, text: log, encoding })
  })

  it.each([
    ['a workbook', [0x50, 0x4b, 0x03, 0x04, 20, 0], 'spreadsheet or zip file'],
    ['a PDF', [...utf8('%PDF-1.7\n1 0 obj')], 'PDF'],
    ['a picture', [0x89, 0x50, 0x4e, 0x47, 13, 10], 'picture'],
    ['bytes with zeros', [...utf8('1;2\n'), 0, 0, 0, 7, 9, 200], 'binary file'],
    ['bytes with control characters', Array.from({ length: 200 }, (_, i) => (i % 20 === 0 ? 3 : 65)), 'binary file'],
    ['a broken UTF-16 text', [0xff, 0xfe, 0x00, 0xd8, 0x41, 0x00], 'binary file'],
  ])('refuses %s and says what it seems to be', (_name, bytes, kind) => {
    expect(decodeBytes(Uint8Array.from(bytes))).toEqual({ ok: false, code: 'readings/not-text', params: { kind } })
  })

  it('refuses a file without a byte', () => {
    expect(decodeBytes(new Uint8Array())).toMatchObject({ ok: false, code: 'readings/empty-file' })
  })
})
