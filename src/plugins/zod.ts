import { z } from 'zod'

// Imported before any contract: zod would otherwise build parsers with eval, which the page's policy forbids.
z.config({ jitless: true })
