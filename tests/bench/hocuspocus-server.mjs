import { Server } from '@hocuspocus/server'

// The yardstick: a general-purpose Yjs server as it comes, in memory, without access checks.
new Server({ port: Number(process.env.PORT), address: '127.0.0.1', quiet: true }).listen()
