export type Nib = 'pen' | 'highlight'
