import { z } from 'zod'

// Without this zod probes `eval`, which the content security policy refuses and reports.
z.config({ jitless: true })

export { z }
