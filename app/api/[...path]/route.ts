import { refuse } from '@/lib/http/errors'
import { read, write } from '@/lib/http/route'

// What is not there answers like everything else of the API: in one shape and with its headers.
const nothing = () => {
  throw refuse.notFound()
}

export const GET = read({ permission: 'public', handler: nothing })
export const POST = write({ permission: 'public', handler: nothing })
export const PUT = POST
export const PATCH = POST
export const DELETE = POST
