import { config } from '#server/config.ts'
import { route } from '#server/http/route.ts'
import { me } from '#shared/schemas/me.ts'

export const meRoutes = [
  route({
    method: 'get',
    path: '/api/me',
    action: 'me.read',
    returns: me,
    handle: async ({ actor }) => ({
      person: { id: actor.personId, name: actor.name, email: actor.email, roles: [...actor.roles] },
      idleExpiresAt: actor.idleExpiresAt.toISOString(),
      installation: {
        name: config().BREATHMARK_INSTALLATION_NAME,
        standIn: config().BREATHMARK_OIDC_STAND_IN === 'true',
      },
    }),
  }),
]
