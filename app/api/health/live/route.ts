import { json, route } from '@/app/_server/respond'

/** 200 while this process answers at all. Tells a stranger nothing else. */
export const GET = route(async () => json({ live: true }))
