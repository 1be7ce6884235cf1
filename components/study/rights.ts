import type { Actor } from '@/lib/auth/actor'
import { may } from '@/lib/auth/permissions'
import type { StudyRights } from './study-heading'

export function studyRights(actor: Pick<Actor, 'roles'>): StudyRights {
  return {
    mayWrite: may(actor, 'study.write'),
    mayPutForward: may(actor, 'case.put-forward'),
    mayReadReadings: may(actor, 'reading.read'),
    maySeeJars: may(actor, 'bench.read'),
    maySeeRecord: may(actor, 'trail.read'),
    mayReadBatches: may(actor, 'batch.read'),
  }
}
