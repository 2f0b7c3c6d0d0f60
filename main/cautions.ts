// What everybody who builds and drives an antenna must hear, in as few lines as it takes.

export const CAUTIONS: readonly string[] = [
  'Keep people away from a driven antenna by the distance your exposure rules ask for; nothing here shows compliance.',
  'Transmit only where and as your licence and the national frequency table allow; radiated power counts the gain.',
];
