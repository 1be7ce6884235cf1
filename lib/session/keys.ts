export const sessionKey = '/api/session'
