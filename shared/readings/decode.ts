import type { Params } from './codes.ts'

/** Web standard, present in browsers and Node alike; declared here because `shared` has neither's types. */
declare class TextDecoder {
  constructor(label: string, options?: { fatal?: boolean })
  decode(bytes: Uint8Array): string
}

export type Encoding = 'utf-8' | 'utf-16le' | 'utf-16be' | 'windows-1252'

export type Decoded =
  | { ok: true; text: string; encoding: Encoding }
  | { ok: false; code: 'readings/not-text' | 'readings/empty-file'; params: Params }

/** First bytes of files that people take for text because a spreadsheet or viewer opens them. */
const signatures: { kind: string; bytes: number[] }[] = [
  { kind: 'spreadsheet or zip file', bytes: [0x50, 0x4b, 0x03, 0x04] },
  { kind: 'spreadsheet or document', bytes: [0xd0, 0xcf, 0x11, 0xe0] },
  { kind: 'PDF', bytes: [0x25, 0x50, 0x44, 0x46] },
  { kind: 'picture', bytes: [0x89, 0x50, 0x4e, 0x47] },
  { kind: 'picture', bytes: [0xff, 0xd8, 0xff] },
  { kind: 'compressed file', bytes: [0x1f, 0x8b] },
]

const marks: { encoding: Encoding; bytes: number[] }[] = [
  { encoding: 'utf-8', bytes: [0xef, 0xbb, 0xbf] },
  { encoding: 'utf-16le', bytes: [0xff, 0xfe] },
  { encoding: 'utf-16be', bytes: [0xfe, 0xff] },
]

const SAMPLE_BYTES = 65_536
/** Share of control characters that text never reaches and binary data soon does. */
const MOST_CONTROLS = 0.01
/** Tab, line feed, vertical tab, form feed, carriage return, and the old end-of-file mark. */
const TEXT_CONTROLS = new Set([9, 10, 11, 12, 13, 26])

const startsWith = (bytes: Uint8Array, start: number[]) => start.every((byte, i) => bytes[i] === byte)

/** UTF-16 without a mark: Western digits and letters leave every second byte zero. */
function unmarkedUtf16(bytes: Uint8Array): Encoding | null {
  const n = Math.min(bytes.length, SAMPLE_BYTES) & ~1
  const zeros = [0, 0]
  for (let i = 0; i < n; i++) if (bytes[i] === 0) zeros[i & 1]!++
  const [even = 0, odd = 0] = zeros
  const most = 0.4 * n
  if (odd > most && even === 0) return 'utf-16le'
  return even > most && odd === 0 ? 'utf-16be' : null
}

function looksBinary(bytes: Uint8Array): boolean {
  const sample = bytes.subarray(0, SAMPLE_BYTES)
  let controls = 0
  for (const byte of sample) if (byte < 32 && !TEXT_CONTROLS.has(byte)) controls++
  return bytes.includes(0) || controls > MOST_CONTROLS * sample.length
}

function decodeAs(bytes: Uint8Array, encoding: Encoding): string | null {
  try {
    return new TextDecoder(encoding, { fatal: true }).decode(bytes)
  } catch {
    return null
  }
}

const notText = (kind: string): Decoded => ({ ok: false, code: 'readings/not-text', params: { kind } })

/**
 * The text of a file: UTF-8 or UTF-16 by byte-order mark or validity, else Windows-1252, which holds Latin-1.
 * Binary files are refused, with what they seem to be in `params.kind`.
 */
export function decodeBytes(bytes: Uint8Array): Decoded {
  if (bytes.length === 0) return { ok: false, code: 'readings/empty-file', params: {} }
  const signature = signatures.find((candidate) => startsWith(bytes, candidate.bytes))
  if (signature) return notText(signature.kind)
  const marked = marks.find((mark) => startsWith(bytes, mark.bytes))?.encoding ?? unmarkedUtf16(bytes)
  if (!marked && looksBinary(bytes)) return notText('binary file')
  const tries: Encoding[] = marked ? [marked] : ['utf-8', 'windows-1252']
  for (const encoding of tries) {
    const text = decodeAs(bytes, encoding)
    if (text !== null) return { ok: true, text, encoding }
  }
  return notText('binary file')
}
