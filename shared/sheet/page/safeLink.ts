const protocols = new Set(['http:', 'https:', 'mailto:'])

/** Whether a link may stand in a document: `http`, `https` or `mailto`, written out in full. */
export const isSafeLink = (href: string): boolean => {
  if (href.length > 2000 || !/^[a-z]+:\S+$/i.test(href) || /[\p{Cc}\p{Cs}]/u.test(href)) return false
  try {
    return protocols.has(new URL(href).protocol)
  } catch {
    return false
  }
}
