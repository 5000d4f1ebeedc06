import type { z } from 'zod'
import { ApiError, refusalFrom, unreachable } from './ApiError.ts'
import { noteAnswer } from './lastAnswer.ts'
import { openerHeader } from './opener.ts'
import { tellSignedOut } from './signedOut.ts'

export type Method = 'get' | 'post' | 'put' | 'patch' | 'delete'
type QueryValue = string | number | boolean | null | undefined

export type RequestOptions = {
  body?: unknown
  /** Blank, null and undefined entries are left out. */
  query?: Record<string, QueryValue>
  form?: FormData
  /** The version that the person was looking at. */
  ifMatch?: string
  signal?: AbortSignal
}

/**
 * A page of another origin cannot set these headers, so a write that carries them came from here. The
 * offset from UTC goes to the audit trail beside the server's own time.
 */
const writeHeaders = () => ({
  'x-breathmark': '1',
  'x-breathmark-offset': localOffset(new Date()),
  ...openerHeader(),
})

function localOffset(now: Date): string {
  const minutes = -now.getTimezoneOffset()
  const two = (value: number) => String(Math.trunc(value)).padStart(2, '0')
  return `${minutes < 0 ? '-' : '+'}${two(Math.abs(minutes) / 60)}:${two(Math.abs(minutes) % 60)}`
}

/**
 * Asks the server of this origin and parses its answer.
 * @throws ApiError for every refusal, an unreachable server and an answer of another shape
 */
export async function request<S extends z.ZodType>(
  schema: S,
  method: Method,
  path: string,
  options: RequestOptions = {},
): Promise<z.output<S>> {
  const response = await send(method, path, options)
  const body = await readBody(response)
  if (!response.ok) throw refused(response.status, body)
  noteAnswer()
  return parse(schema, body, response.status)
}

async function send(method: Method, path: string, options: RequestOptions): Promise<Response> {
  const headers: Record<string, string> = { accept: 'application/json' }
  if (method !== 'get') Object.assign(headers, writeHeaders())
  if (options.body !== undefined) headers['content-type'] = 'application/json'
  if (options.ifMatch !== undefined) headers['if-match'] = options.ifMatch
  try {
    return await fetch(withQuery(path, options.query), {
      method: method.toUpperCase(),
      headers,
      body: options.form ?? (options.body === undefined ? undefined : JSON.stringify(options.body)),
      credentials: 'same-origin',
      signal: options.signal,
    })
  } catch (error) {
    if (options.signal?.aborted) throw error
    throw unreachable()
  }
}

export function withQuery(path: string, query: RequestOptions['query']): string {
  const search = new URLSearchParams()
  for (const [name, value] of Object.entries(query ?? {})) {
    if (value !== undefined && value !== null && value !== '') search.set(name, String(value))
  }
  return search.size > 0 ? `${path}?${search}` : path
}

async function readBody(response: Response): Promise<unknown> {
  return readJson(await response.text())
}

function readJson(text: string): unknown {
  if (text === '') return undefined
  try {
    return JSON.parse(text)
  } catch {
    return undefined
  }
}

function refused(status: number, body: unknown): ApiError {
  const error = refusalFrom(status, body)
  // A signature asks for a fresh sign-in too, but its login has not ended.
  if (status === 401 && error.code !== 'signature-needed') tellSignedOut()
  return error
}

function parse<S extends z.ZodType>(schema: S, body: unknown, status: number): z.output<S> {
  const parsed = schema.safeParse(body)
  if (parsed.success) return parsed.data
  console.error('An answer of another shape than agreed', parsed.error.issues)
  throw new ApiError({
    status,
    code: 'unexpected-answer',
    message:
      'The server gave an answer that this page does not understand. Load the page again: it may be older than the server.',
  })
}

export type UploadOptions = {
  /** 0 to 1, as far as the browser has sent it. */
  onProgress?: (fraction: number) => void
  signal?: AbortSignal
}

/** Posts a form with files. fetch() cannot tell how much has been sent; XMLHttpRequest can. */
export function upload<S extends z.ZodType>(
  schema: S,
  path: string,
  form: FormData,
  { onProgress, signal }: UploadOptions = {},
): Promise<z.output<S>> {
  return new Promise((resolve, reject) => {
    const xhr = new XMLHttpRequest()
    xhr.open('POST', path)
    xhr.setRequestHeader('accept', 'application/json')
    for (const [name, value] of Object.entries(writeHeaders())) xhr.setRequestHeader(name, value)
    xhr.upload.onprogress = (event) => {
      if (event.lengthComputable) onProgress?.(event.loaded / event.total)
    }
    xhr.onload = () => {
      const body = readJson(xhr.responseText)
      if (xhr.status >= 400) return reject(refused(xhr.status, body))
      try {
        resolve(parse(schema, body, xhr.status))
      } catch (error) {
        reject(error)
      }
    }
    xhr.onerror = () => reject(unreachable())
    xhr.onabort = () => reject(new DOMException('Stopped', 'AbortError'))
    signal?.addEventListener('abort', () => xhr.abort(), { once: true })
    xhr.send(form)
  })
}
