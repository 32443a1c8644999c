import { createContext, useContext } from 'react'

const Nonce = createContext<string | undefined>(undefined)

/** Gives the page's one-time number for inline scripts to everything rendered on the server. */
export const NonceProvider = Nonce.Provider
/** The number our content security policy lets inline scripts run by; undefined in the browser, where none are added. */
export const useNonce = () => useContext(Nonce)
