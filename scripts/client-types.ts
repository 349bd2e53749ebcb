import openapiTS, { astToString } from 'openapi-typescript'

/** Types of a client, made from the document of the interface. */
export async function clientTypes(document: string): Promise<string> {
  const nodes = await openapiTS(document, { alphabetize: true })
  return `/** Made from openapi.json by npm run openapi: for a typed client, such as openapi-fetch. */\n${astToString(nodes)}`
}
