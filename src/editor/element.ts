/** A small builder of static DOM, for line views that must cost nothing until they are used. */
type Child = Node | string | undefined | null | false

export const element = <Tag extends keyof HTMLElementTagNameMap>(
  tag: Tag,
  attributes: Record<string, string | boolean | undefined> = {},
  ...children: Child[]
): HTMLElementTagNameMap[Tag] => {
  const made = document.createElement(tag)
  for (const [name, value] of Object.entries(attributes)) {
    if (value === undefined || value === false) continue
    made.setAttribute(name, value === true ? '' : value)
  }
  made.append(...children.filter((child): child is Node | string => Boolean(child)))
  return made
}

/** A button that acts; its label is what a screen reader says. */
export const button = (
  label: string,
  className: string,
  act: (event: MouseEvent) => void,
): HTMLButtonElement => {
  const made = element('button', { type: 'button', class: className }, label)
  made.addEventListener('click', act)
  return made
}
