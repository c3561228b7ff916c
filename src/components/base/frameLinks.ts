/** The frame's places, in the order of its row. */
export const frameLinks = [
  { name: 'in-tray', label: 'In-tray' },
  { name: 'calculations', label: 'Calculations' },
  { name: 'projects', label: 'Projects' },
  { name: 'templates', label: 'Templates' },
  { name: 'people', label: 'People' },
] as const
