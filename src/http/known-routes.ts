/** A path pattern and the methods it was declared for. */
export interface KnownRoute {
  readonly methods: readonly string[]
  readonly url: string
}

/** Methods that a path answers, sorted; none when there is no such path. */
export function allowedMethods(routes: readonly KnownRoute[], path: string): string[] {
  const methods = routes.filter(({ url }) => matches(url, path)).flatMap((route) => route.methods)
  return methods.length === 0 ? [] : [...new Set([...methods, 'OPTIONS'])].sort()
}

/** Whether a path fits a pattern with `:name` for one step and a final `*` for the rest. */
function matches(pattern: string, path: string): boolean {
  if (pattern === '*') return false
  const wanted = pattern.split('/')
  const given = path.split('/')
  if (wanted.at(-1) === '*') return wanted.slice(0, -1).every((step, index) => fits(step, given[index]))
  return wanted.length === given.length && wanted.every((step, index) => fits(step, given[index]))
}

const fits = (step: string, given: string | undefined): boolean =>
  step.startsWith(':') ? given !== undefined && given !== '' : step === given
