import { Bold } from '@tiptap/extension-bold'
import { Code } from '@tiptap/extension-code'
import { Italic } from '@tiptap/extension-italic'
import { Link } from '@tiptap/extension-link'
import { isSafeLink } from './safeLink'

export const PageBold = Bold
export const PageItalic = Italic

/** One person may make code of what a colleague makes bold: both marks stay. */
export const PageCode = Code.extend({ excludes: '' })

/** A link is its address, nothing else; it opens by the reader's own act. */
export const PageLink = Link.extend({
  inclusive: false,
  addAttributes() {
    return {
      href: { default: null, parseHTML: (element) => element.getAttribute('href') },
    }
  },
}).configure({
  protocols: ['http', 'https', 'mailto'],
  defaultProtocol: 'https',
  openOnClick: false,
  isAllowedUri: (url) => isSafeLink(url),
  HTMLAttributes: { rel: 'noopener noreferrer nofollow', target: '_blank' },
})
