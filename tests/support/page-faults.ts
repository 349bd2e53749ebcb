/** Texts that reach out of their box, run in the page. */
export const OVERFLOWS = `(() => {
  const found = []
  for (const element of document.querySelectorAll('body *:not(svg *)')) {
    const style = getComputedStyle(element)
    if (style.display === 'inline' || style.display === 'none' || element.closest('option, svg, select')) continue
    if (element.scrollWidth > element.clientWidth + 1 && element.clientWidth > 0) {
      found.push(element.tagName + ' ' + element.textContent.slice(0, 60))
    }
  }
  for (const svg of document.querySelectorAll('svg')) {
    const frame = svg.getBoundingClientRect()
    if (frame.width === 0) continue
    for (const text of svg.querySelectorAll('text')) {
      const box = text.getBoundingClientRect()
      if (box.left < frame.left - 1 || box.right > frame.right + 1 || box.top < frame.top - 1 || box.bottom > frame.bottom + 1) {
        found.push('text ' + text.textContent)
      }
    }
  }
  return found
})()`

/** Pairs of labels of one drawing that lie on one another, run in the page. */
export const OVERLAPS = `(() => {
  const found = []
  for (const svg of document.querySelectorAll('svg')) {
    if (svg.getBoundingClientRect().width === 0) continue
    const boxes = [...svg.querySelectorAll('text')].map((text) => [text.textContent, text.getBoundingClientRect()])
    boxes.forEach(([name, a], i) => {
      for (const [other, b] of boxes.slice(i + 1)) {
        const across = Math.min(a.right, b.right) - Math.max(a.left, b.left)
        const down = Math.min(a.bottom, b.bottom) - Math.max(a.top, b.top)
        // boxes of lines of text hold their leading: letters touch only when boxes share more than a third of it
        if (across > 1 && down > 0.35 * Math.min(a.height, b.height)) found.push(name + ' | ' + other)
      }
    })
  }
  return found
})()`

/** Texts smaller than so many px as they are shown, run in the page. */
export const smallerThan = (px: number): string => `(() => {
  const found = new Set()
  for (const text of document.querySelectorAll('svg text')) {
    const svg = text.ownerSVGElement
    const scale = svg.getBoundingClientRect().width / svg.viewBox.baseVal.width
    if (scale === 0) continue
    const size = parseFloat(getComputedStyle(text).fontSize) * scale
    if (size < ${px}) found.add(size.toFixed(2) + ' ' + text.textContent)
  }
  const walker = document.createTreeWalker(document.body, NodeFilter.SHOW_TEXT)
  for (let node = walker.nextNode(); node; node = walker.nextNode()) {
    const parent = node.parentElement
    if (node.textContent.trim() === '' || parent.closest('svg, style') || parent.getClientRects().length === 0) continue
    const size = parseFloat(getComputedStyle(parent).fontSize)
    if (size < ${px}) found.add(size.toFixed(2) + ' ' + node.textContent.slice(0, 40))
  }
  return [...found]
})()`
