/** All migrations, oldest first. A released one is never edited: the next one changes what it made. */
import { Foundation1764590400000 } from './1764590400000-Foundation'

export const migrations = [Foundation1764590400000]
