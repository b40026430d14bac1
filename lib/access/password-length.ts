/** Characters a password may have; apart from the hashing, so that forms can say it too. */
export const passwordLength = { min: 10, max: 200 } as const;
