/** The cuts a report is set in. */
export const faceNames = ['sans', 'sansBold', 'sansItalic', 'condensed', 'condensedMedium', 'condensedBold', 'mono'] as const;
export type FaceName = (typeof faceNames)[number];

/** Bytes of a TrueType font for each cut; they are embedded, as far as they are used. */
export type ReportFonts = Readonly<Record<FaceName, Uint8Array>>;
