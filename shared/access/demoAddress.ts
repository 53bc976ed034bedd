/** Where the invented people of the demo library have their addresses. ".example" is reserved and never delivered (RFC 2606). */
export const DEMO_DOMAIN = 'hollinbeck.example'

/** The one password of all demo accounts, shown on the sign-in page in demo mode and refused outside of it. */
export const DEMO_PASSWORD = 'stone turns on stone'

export const isDemoAddress = (email: string): boolean => email.toLowerCase().endsWith(`@${DEMO_DOMAIN}`)
