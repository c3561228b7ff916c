import { isSafeLink } from '@shared/sheet/page'

export type LinkReading = { href: string } | { problem: string }

const mailbox = /^[^\s@/:]+@[^\s@/:]+\.[^\s@/:]+$/
const host = /^(?:[a-z0-9-]+\.)+[a-z]{2,}(?::\d+)?(?:[/?#]\S*)?$/i

/**
 * Reads a typed address: a bare mailbox becomes `mailto:`, a bare host `https://`; anything but http,
 * https and mailto is refused with the reason, since a document must not run anything.
 */
export const readLinkAddress = (typed: string): LinkReading => {
  const text = typed.trim()
  if (text === '') return { problem: 'Write the address that the link leads to.' }
  if (/\s/.test(text)) return { problem: 'An address has no spaces. Write %20 where there is one.' }
  const href = mailbox.test(text) ? `mailto:${text}` : host.test(text) ? `https://${text}` : text
  if (isSafeLink(href)) return { href }
  const scheme = /^([a-z][a-z0-9+.-]*):/i.exec(href)?.[1]?.toLowerCase()
  if (scheme && !['http', 'https', 'mailto'].includes(scheme))
    return { problem: `Links lead to http, https or mailto addresses; this one begins with “${scheme}:”.` }
  return { problem: 'This is no full address. Write it like https://example.com/page or name@example.com.' }
}
