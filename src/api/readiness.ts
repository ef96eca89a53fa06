import { transport } from './transport.ts'

/** Whether the server and its database answer. */
export async function serverAnswers(): Promise<boolean> {
  try {
    const { status } = await transport({ method: 'GET', path: '/readyz', headers: {}, body: null })
    return status === 200
  } catch {
    return false
  }
}
