import type { Request, Response } from 'express'
import type { Config } from '../../config'
import { ACCESS_SECONDS } from './tokens'

export const REFRESH_DAYS = 30
const DAY_MS = 86_400_000

const nameOf = (config: Config, name: 'access' | 'refresh'): string => `${config.isSecure ? '__Host-' : ''}wb_${name}`
const attributes = (config: Config) => ({ httpOnly: true, sameSite: 'strict', secure: config.isSecure, path: '/' }) as const

export function setCookies(config: Config, response: Response, tokens: { access: string; refresh: string }): void {
  response.cookie(nameOf(config, 'access'), tokens.access, { ...attributes(config), maxAge: ACCESS_SECONDS * 1000 })
  response.cookie(nameOf(config, 'refresh'), tokens.refresh, { ...attributes(config), maxAge: REFRESH_DAYS * DAY_MS })
}
export function clearCookies(config: Config, response: Response): void {
  response.clearCookie(nameOf(config, 'access'), attributes(config))
  response.clearCookie(nameOf(config, 'refresh'), attributes(config))
}
export function cookieOf(config: Config, request: Request, name: 'access' | 'refresh'): string | null {
  const value: unknown = (request.cookies as Record<string, unknown> | undefined)?.[nameOf(config, name)]
  return typeof value === 'string' && value.length < 1000 ? value : null
}
