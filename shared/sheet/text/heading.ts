/** What a text says about itself beside the sheet. */
export interface Heading {
  title: string
  number?: string
  template?: { name: string; edition: string }
}
