import { Answer, nothing, route, type Route } from '../../route'
import type { House } from '../../house'
import { IdParams } from '../../fields'
import { readDemoAccounts, readDevelopmentMail } from './development'
import { clearCookies, cookieOf, setCookies } from './cookies'
import { AcceptDto, ForgotDto, MeDto, PasswordDto, ResetDto, SignInDto, TokenParams } from './session.dto'
import { failedSignIns } from './sign-in-limit'
import * as session from './session.service'

const userAgentOf = (request: { get(name: string): string | undefined }): string => request.get('user-agent') ?? ''

export const sessionRoutes = (house: House): Route[] => {
  const limit = failedSignIns()
  return [
    route({
      method: 'post', path: '/api/session', may: 'anyone', summary: 'Sign in', body: SignInDto, perMinute: 60,
      problems: ['wrong-credentials', 'too-many-requests'],
      handle: async ({ body, request, response }) => {
        const signedIn = await limit.guard(body.email, request.ip ?? '', () => session.signIn(house, { ...body, userAgent: userAgentOf(request) }))
        setCookies(house.config, response, signedIn.tokens)
        return signedIn.me
      },
    }),
    route({
      method: 'post', path: '/api/session/refresh', may: 'anyone', summary: 'Renew the session', perMinute: 120, problems: ['not-signed-in'],
      handle: async ({ request, response }) => {
        const signedIn = await session.refresh(house, cookieOf(house.config, request, 'refresh'))
        const refresh = signedIn.tokens.refresh || cookieOf(house.config, request, 'refresh') || ''
        setCookies(house.config, response, { access: signedIn.tokens.access, refresh })
        return signedIn.me
      },
    }),
    route({
      method: 'delete', path: '/api/session', may: 'anyone', summary: 'Sign out',
      handle: async ({ request, response }) => {
        await session.signOut(house, cookieOf(house.config, request, 'refresh'))
        clearCookies(house.config, response)
        return nothing()
      },
    }),
    route({
      method: 'get', path: '/api/me', may: 'account.own', summary: 'The person signed in',
      handle: ({ who }) => house.database.inCompany(who, (tx) => session.meOf(tx, who.companyId, who.personId)),
    }),
    route({
      method: 'patch', path: '/api/me', may: 'account.own', summary: 'Change own name and preferences', body: MeDto,
      handle: ({ who, body }) => house.database.inCompany(who, (tx) => session.changeMe(tx, who, body)),
    }),
    route({
      method: 'post', path: '/api/me/password', may: 'account.own', summary: 'Change own password; other devices are signed out', body: PasswordDto, perMinute: 10,
      handle: async ({ who, body }) => {
        await house.database.inCompany(who, (tx) => session.changePassword(tx, who, body, house.now()))
        return nothing()
      },
    }),
    route({
      method: 'get', path: '/api/me/devices', may: 'account.own', summary: 'Where one is signed in',
      handle: ({ who }) => house.database.inCompany(who, (tx) => session.devices(tx, who)),
    }),
    route({
      method: 'delete', path: '/api/me/devices/:id', may: 'account.own', summary: 'Sign a device out', params: IdParams, problems: ['not-found'],
      handle: async ({ who, params }) => {
        await house.database.inCompany(who, (tx) => session.endDevice(tx, who, params.id, house.now()))
        return nothing()
      },
    }),
    route({
      method: 'post', path: '/api/password/forgot', may: 'anyone', summary: 'Ask for a reset link by mail', body: ForgotDto, perMinute: 5,
      handle: ({ body }) => {
        session.forgot(house, body.email).catch((error: unknown) => house.log.error({ err: error }, 'reset letter not sent'))
        return new Answer(202)
      },
    }),
    route({
      method: 'post', path: '/api/password/reset', may: 'anyone', summary: 'Set a new password by a reset link', body: ResetDto, perMinute: 10, problems: ['link-expired'],
      handle: async ({ body }) => {
        await session.resetPassword(house, body)
        return nothing()
      },
    }),
    route({
      method: 'get', path: '/api/invitations/:token', may: 'anyone', summary: 'Whom an invitation is for', params: TokenParams, perMinute: 30, problems: ['link-expired'],
      handle: ({ params }) => session.readInvitation(house, params.token),
    }),
    route({
      method: 'post', path: '/api/invitations/:token', may: 'anyone', summary: 'Accept an invitation', params: TokenParams, body: AcceptDto, perMinute: 10, problems: ['link-expired'],
      handle: async ({ params, body, request, response }) => {
        const signedIn = await session.acceptInvitation(house, params.token, { ...body, userAgent: userAgentOf(request) })
        setCookies(house.config, response, signedIn.tokens)
        return signedIn.me
      },
    }),
    route({
      method: 'get', path: '/api/demo-accounts', may: 'anyone', summary: 'Accounts of the demo company, where it is loaded', problems: ['not-found'],
      handle: () => readDemoAccounts(house),
    }),
    route({
      method: 'get', path: '/api/dev/mail', may: 'anyone', summary: 'Mail that the development server took', problems: ['not-found'],
      handle: () => readDevelopmentMail(house),
    }),
  ]
}
