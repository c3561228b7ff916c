import { errorBody, type ErrorCode } from '@shared/api/problems'
import type { z } from 'zod'

/** A refusal or failure, with words that can be shown as they are. */
export class ApiError extends Error {
  constructor(
    message: string,
    /** HTTP status; 0 where no answer came. */
    readonly status: number,
    /** The server's code; `no-answer` and `unreadable` are found here. */
    readonly code: ErrorCode | 'no-answer' | 'unreadable',
    /** Stands in the server's log beside what happened. */
    readonly reference?: string,
    /** Messages by path of the field, where a form was refused. */
    readonly fields: Readonly<Record<string, string>> = {},
  ) {
    super(message)
    this.name = 'ApiError'
  }

  /** True where the same request may succeed a little later. */
  get mayPass(): boolean {
    return this.status === 0 || this.status === 429 || this.status >= 500
  }
}

export interface Ask<S extends z.ZodType | null> {
  method?: 'GET' | 'POST' | 'PATCH' | 'PUT' | 'DELETE'
  body?: unknown
  signal?: AbortSignal
  /** What the answer must look like; null where none is expected (204). */
  answer: S
}

type Answer<S> = S extends z.ZodType ? z.infer<S> : undefined

/**
 * One request to our own server; the answer is checked against its schema before anybody sees it.
 * @throws {ApiError} for refusals, failures, a lost connection, and answers of another shape
 */
export const request = async <S extends z.ZodType | null>(path: string, ask: Ask<S>): Promise<Answer<S>> => {
  const response = await send(path, ask)
  if (!response.ok) throw await refusal(response)
  if (ask.answer === null) return undefined as Answer<S>
  const parsed = ask.answer.safeParse(await response.json().catch(() => undefined))
  if (parsed.success) return parsed.data as Answer<S>
  throw new ApiError(
    'The server’s answer could not be read. The program may have been renewed meanwhile: reload the page.',
    response.status,
    'unreadable',
  )
}

const send = async (
  path: string,
  { method = 'GET', body, signal }: Ask<z.ZodType | null>,
): Promise<Response> => {
  try {
    return await fetch(`/api${path}`, {
      method,
      credentials: 'same-origin',
      headers: {
        Accept: 'application/json',
        ...(body === undefined ? {} : { 'Content-Type': 'application/json' }),
      },
      ...(body === undefined ? {} : { body: JSON.stringify(body) }),
      ...(signal ? { signal } : {}),
    })
  } catch (failure) {
    if (signal?.aborted) throw failure
    throw new ApiError('The server does not answer. Check the connection and try again.', 0, 'no-answer')
  }
}

const refusal = async (response: Response): Promise<ApiError> => {
  const parsed = errorBody.safeParse(await response.json().catch(() => undefined))
  if (!parsed.success)
    return new ApiError(
      `The server could not do this (${response.status}). Try again.`,
      response.status,
      'unreadable',
    )
  const { code, message, reference, fields = [] } = parsed.data.error
  const byPath = Object.fromEntries(fields.map((field) => [field.path, field.message]))
  return new ApiError(message, response.status, code, reference, byPath)
}

/** `?project=…&search=…` of what is given; empty where nothing is. */
export const queryOf = (filter: Record<string, string | undefined>): string => {
  const given = Object.entries(filter).filter((entry): entry is [string, string] => Boolean(entry[1]))
  return given.length === 0 ? '' : `?${new URLSearchParams(given).toString()}`
}
