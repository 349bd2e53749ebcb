/**
 * Works on the items of a source, some at a time, and hands the results on in the order of the items, each as soon as it
 * and those before it are ready, also while the source has nothing new. Ending early ends the source; a source that fails
 * ends the work at once.
 *
 * @param atOnce  items that are worked on at a time, ≥ 1
 */
export async function* inOrder<Item, Result>(
  source: AsyncIterable<Item>,
  work: (item: Item) => Promise<Result>,
  atOnce: number,
): AsyncGenerator<Result> {
  const iterator = source[Symbol.asyncIterator]()
  const working: Promise<{ readonly result: Result }>[] = []
  let failure: { readonly error: unknown } | undefined
  const pull = () => {
    const pulled = iterator.next().then((item) => ({ item }))
    pulled.catch((error: unknown) => {
      failure = { error }
    })
    return pulled
  }
  let next: ReturnType<typeof pull> | undefined = pull()
  try {
    while (next || working.length > 0) {
      const [oldest] = working
      const canTake = next && working.length < atOnce
      const ready = await Promise.race([...(oldest ? [oldest] : []), ...(canTake && next ? [next] : [])])
      if (failure) throw failure.error
      if ('result' in ready) {
        void working.shift()
        yield ready.result
      } else if (ready.item.done === true) {
        next = undefined
      } else {
        const started = work(ready.item.value).then((result) => ({ result }))
        // it is seen when its turn comes
        started.catch(() => undefined)
        working.push(started)
        next = pull()
      }
    }
  } finally {
    await iterator.return?.()
  }
}
