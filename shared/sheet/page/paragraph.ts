import { Paragraph } from '@tiptap/extension-paragraph'

export const PageParagraph = Paragraph
