/**
 * The pages of a revision, as PDF.
 *
 * - `GET /api/revisions/:id/pages.pdf?paper=A4&purpose=` → `application/pdf`: the sheet as it is stored at
 *   this moment, every page marked *preliminary – not issued*
 */
import { z } from 'zod'
import { line } from './fields'

export const papers = ['A4', 'Letter'] as const

export const pagesQuery = z.object({
  paper: z.enum(papers, { error: 'The paper is A4 or Letter.' }).default('A4'),
  /** What the print is for, in the words of who prints; by default what the revision's state says. */
  purpose: line(0, 120).default(''),
})
export type PagesQuery = z.infer<typeof pagesQuery>
export type PagesQueryInput = z.input<typeof pagesQuery>
