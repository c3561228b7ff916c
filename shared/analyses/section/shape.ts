/** What the figure of a section needs to know, in m; `wall` is the index of the wall with the greatest stress. */
export type SectionShape =
  | { shape: 'round'; outer: number; bore: number }
  | { shape: 'rectangle'; a: number; b: number }
  | { shape: 'closed-cell'; points: { y: number; z: number; t: number }[]; wall: number }
