import type { Template, TemplateGiven, TemplateSummary } from '@shared/api/templates'
import type { Given, Line } from '@shared/sheet/kinds'
import type { LoadedTemplate } from '@server/services/templates/library'

export const linesOf = ({ sheet }: LoadedTemplate): Line[] =>
  sheet.blocks.flatMap((block) => (block.type === 'line' ? [block.line] : []))

export const presentTemplateSummary = (template: LoadedTemplate): TemplateSummary => {
  const lines = linesOf(template)
  return {
    name: template.name,
    title: template.title,
    edition: template.edition,
    purpose: template.sheet.front.purpose,
    method: template.sheet.front.method,
    unitSystem: template.sheet.front.unitSystem,
    lines: lines.length,
    criteria: lines.filter((line) => line.kind === 'criterion').length,
  }
}

const presentGiven = (line: Given): TemplateGiven => ({
  line: line.id,
  symbol: line.symbol,
  note: line.note,
  value: line.value,
  unit: line.unit,
  source: line.source,
  nature: line.nature,
  range: line.range
    ? {
        ...(line.range.from === undefined ? {} : { from: line.range.from }),
        ...(line.range.to === undefined ? {} : { to: line.range.to }),
      }
    : null,
  choices: line.choices ?? [],
})

export const presentTemplate = (template: LoadedTemplate): Template => ({
  ...presentTemplateSummary(template),
  givens: linesOf(template).flatMap((line) => (line.kind === 'given' ? [presentGiven(line)] : [])),
  sheet: template.sheet,
})
