import type { Action } from '@shared/review/permissions'

export interface FrameLink {
  name: string
  label: string
  /** What one must be allowed to do for the place to be worth a link. */
  needs?: Action
}

/** The frame's places, in the order of its row. */
export const frameLinks: FrameLink[] = [
  { name: 'in-tray', label: 'In-tray' },
  { name: 'calculations', label: 'Calculations' },
  { name: 'projects', label: 'Projects', needs: 'see-projects' },
  { name: 'templates', label: 'Templates', needs: 'see-templates' },
  { name: 'people', label: 'People', needs: 'see-people' },
]
