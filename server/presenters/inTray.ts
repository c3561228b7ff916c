import type { InTray, InTrayEntry } from '@shared/api/inTray'
import type { Tray, TrayEntry } from '@server/services/readInTray'

const presentEntry = ({ verb, row, part, detail, note, at }: TrayEntry): InTrayEntry => ({
  verb,
  calculationId: row.id,
  revisionId: row.revisionId,
  number: row.number,
  letter: row.letter,
  title: row.title,
  project: row.projectName,
  state: row.state,
  part,
  detail,
  note,
  dueOn: row.dueOn,
  at: at.toISOString(),
})

export const presentInTray = ({ waitsForMe, iWaitFor, changed }: Tray): InTray => ({
  waitsForMe: waitsForMe.map(presentEntry),
  iWaitFor: iWaitFor.map(presentEntry),
  changed: changed.map(presentEntry),
})
