import { redirect } from 'next/navigation'
import { may } from '@/lib/auth/permissions'
import { page } from '@/lib/http/page'

export const permission = 'profile.own'

/** Each role's day begins elsewhere. */
export default async function FirstPage() {
  const { actor } = await page(permission)
  if (actor.roles.includes('technician')) redirect('/bench')
  if (actor.roles.includes('formulator')) redirect('/studies')
  if (may(actor, 'case.sign')) redirect('/cases')
  if (may(actor, 'station.write')) redirect('/stations')
  redirect('/reports')
}
