import * as z from '@/lib/http/zod'
import { jobs as cycleJobs } from '@/lib/cycle/jobs'
import { jobs as flagJobs } from '@/lib/flag/jobs'
import { jobs as personJobs } from '@/lib/person/jobs'
import { makePhotoPreview, previewQueue, sweepFiles, sweepQueue } from '@/lib/photo/jobs'
import { jobs as sessionJobs } from '@/lib/session/jobs'
import { jobs as caseJobs } from '@/lib/shelf-case/jobs'
import { jobs as trailJobs } from '@/lib/trail/jobs'
import { job, type Job } from './job'

const photoJobs = [
  job(previewQueue, z.object({ sha256: z.string(), type: z.string().default('image/jpeg') }), (_, data) =>
    makePhotoPreview(data),
  ),
  job(sweepQueue, z.object({}), sweepFiles),
]

/** Every queue has one handler here; a test holds this list against queues.ts. */
export const registry: readonly Job[] = [
  ...trailJobs,
  ...sessionJobs,
  ...personJobs,
  ...photoJobs,
  ...caseJobs,
  ...flagJobs,
  ...cycleJobs,
]
