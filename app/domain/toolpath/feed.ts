/** Length per minute, in the chip load's unit of length. Chip load is the bite of one flute in one turn. */
export const feedRate = (rpm: number, flutes: number, chipLoad: number): number => rpm * flutes * chipLoad;

export const chipLoad = (feed: number, rpm: number, flutes: number): number => feed / (rpm * flutes);
