/** Canonical JSON (RFC 8785) and its SHA-256, the same on tablet and server. */
import { sha256 as digest } from '@noble/hashes/sha2.js'
import { bytesToHex, utf8ToBytes } from '@noble/hashes/utils.js'
import canonicalize from 'canonicalize'

/** The RFC 8785 text of a plain value. Throws on what JSON cannot say (a function, NaN, an infinite number). */
export function canonical(value: unknown): string {
  const text = canonicalize(value)
  if (text === undefined) throw new Error('This value has no JSON form.')
  return text
}

/** SHA-256 of text (as UTF-8) or bytes, as 64 lower-case hex digits. */
export function sha256(of: string | Uint8Array): string {
  return bytesToHex(digest(typeof of === 'string' ? utf8ToBytes(of) : of))
}

export const shaOf = (value: unknown): string => sha256(canonical(value))
