/**
 * Names of a sheet that are close to a misspelt one. Two names are near when each, with at most one
 * character dropped and case aside, can be the same: a letter too many, too few, another, or two
 * exchanged. The index answers without looking through all names.
 */
const forms = (name: string): string[] => {
  const plain = name.toLowerCase()
  const dropped = Array.from({ length: plain.length }, (_, i) => plain.slice(0, i) + plain.slice(i + 1))
  return plain.length > 2 ? [plain, ...dropped] : [plain]
}

export class NearNames {
  private readonly byForm = new Map<string, Set<string>>()

  add(name: string): void {
    for (const form of forms(name)) {
      const names = this.byForm.get(form)
      if (names) names.add(name)
      else this.byForm.set(form, new Set([name]))
    }
  }

  remove(name: string): void {
    for (const form of forms(name)) {
      const names = this.byForm.get(form)
      names?.delete(name)
      if (names?.size === 0) this.byForm.delete(form)
    }
  }

  /** Every name that is near, in no order. */
  near(name: string): string[] {
    const names = new Set(forms(name).flatMap((form) => [...(this.byForm.get(form) ?? [])]))
    names.delete(name)
    return [...names]
  }
}

export const areNear = (a: string, b: string): boolean => {
  const other = new Set(forms(b))
  return forms(a).some((form) => other.has(form))
}
