import { describe, expect, test } from 'vitest'
import { readLinkAddress } from '@/editor/commands/linkAddress'

describe('the address of a link', () => {
  test.each([
    ['https://example.com/a?b=1', 'https://example.com/a?b=1'],
    ['example.com/shaft', 'https://example.com/shaft'],
    ['works@example.com', 'mailto:works@example.com'],
    ['  http://example.com  ', 'http://example.com'],
  ])('%s leads to %s', (typed, href) => {
    expect(readLinkAddress(typed)).toEqual({ href })
  })

  test.each([
    ['javascript:alert(1)', /http, https or mailto.*“javascript:”/],
    ['DATA:text/html,x', /“data:”/],
    ['file:///etc/passwd', /“file:”/],
    ['two words', /no spaces/],
    ['', /Write the address/],
    ['drawing', /no full address/],
  ])('%s is refused with the reason', (typed, words) => {
    const reading = readLinkAddress(typed)
    expect('problem' in reading && reading.problem).toMatch(words)
  })
})
