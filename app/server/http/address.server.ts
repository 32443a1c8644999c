/**
 * Header in which our own web server hands the client's address to the app. The server removes whatever the client sent under
 * this name and writes what the socket says, so it cannot be forged the way x-forwarded-for can.
 */
export const CLIENT_ADDRESS = 'x-doab-client-address'

/** The address of whoever made this request; "unknown" when no server of ours wrote one (the development server). */
export const clientAddress = (request: Request): string => request.headers.get(CLIENT_ADDRESS) ?? 'unknown'
