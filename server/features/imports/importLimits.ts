/** What one file may hold. Larger ones are split by the person who knows them. */
export const MOST_BYTES = 50_000_000
export const MOST_COLUMNS = 300
export const MOST_HEADING_CHARACTERS = 80
export const MOST_CELL_CHARACTERS = 10_000

/**
 * Rows of one file. They enter in one transaction that is held in memory together with its audit
 * events (50,000 rows of nine columns took 1.5 GB and 83 s), so the number stays bounded knowingly.
 */
export const MOST_ROWS = 25_000

/** The file is stored in pieces, well below the database's packet limit. */
export const PIECE_BYTES = 1_000_000

/** What a written covariate may hold; longer text is no code. */
export const MOST_COVARIATE_CHARACTERS = 60
export const MOST_SUBJECT_CHARACTERS = 120
export const MOST_SESSION_NUMBER = 1000
