/** Name and version of the engine, part of every result file and of every frame version's key. */
export const engineVersion = 'tallyframe-engine 0.3.1';
