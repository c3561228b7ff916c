import canonicalize from 'canonicalize'

/**
 * JSON text by RFC 8785: keys sorted by UTF-16 code units, numbers as ECMAScript writes them, no
 * spaces. Digests and stamps are over this text, never over a database's or a document's own bytes.
 * @throws Error for what JSON cannot say: NaN, infinities, circles; callers pass validated data.
 */
export const canonicalText = (value: unknown): string => {
  const text = canonicalize(value)
  if (text === undefined) throw new Error('canonicalText: undefined has no JSON text')
  return text
}

const encoder = new TextEncoder()

export const canonicalBytes = (value: unknown): Uint8Array => encoder.encode(canonicalText(value))
