/** Path of a program of the service, built when the sources are newer. */
export function built(name: string): string
