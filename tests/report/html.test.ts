import { describe, expect, test } from 'vitest'
import { Markup, attributes, escaped, markup } from '../../src/report/html.ts'

describe('markup', () => {
  test('escapes every text and leaves markup as it is', () => {
    expect(markup`<b>${`<script>alert("a" + 'b')</script> & more`}</b>${new Markup('<i/>')}`.text).toBe(
      '<b>&lt;script&gt;alert(&quot;a&quot; + &#39;b&#39;)&lt;/script&gt; &amp; more</b><i/>',
    )
  })

  test('writes lists one after another and leaves out undefined and false', () => {
    expect(markup`${['a', [markup`<b/>`, undefined], false]}`.text).toBe('a<b/>')
  })

  test('writes numbers with two decimals and no negative zero', () => {
    expect(markup`${1.23456} ${-0.001} ${2}`.text).toBe('1.23 0 2')
  })

  test.each([NaN, Infinity, -Infinity])('refuses the number %s', (value) => {
    expect(() => markup`${value}`).toThrow(RangeError)
    expect(() => attributes({ x: value })).toThrow(RangeError)
  })

  test('leaves out attributes without a value and escapes the others', () => {
    expect(attributes({ x: 1, y: undefined, title: '"' }).text).toBe(' x="1" title="&quot;"')
  })

  test('puts the replacement character for what XML does not allow, and drops overrides of direction', () => {
    expect(escaped('a\u0000b\u001fc\ud800d\u202ee')).toBe('a\ufffdb\ufffdc\ufffdde')
    expect(escaped('Größe 水路 ⛵')).toBe('Größe 水路 ⛵')
  })
})
