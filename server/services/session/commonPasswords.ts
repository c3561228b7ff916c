/**
 * Passwords of at least 8 characters that are tried first everywhere. From memory of published lists of
 * leaked passwords; the list need not be complete, length is what protects.
 */
export const commonPasswords: ReadonlySet<string> = new Set(
  `
  12345678 123456789 1234567890 12345678910 123123123 0123456789 987654321 9876543210 87654321 11111111 00000000
  1q2w3e4r 1q2w3e4r5t 1qaz2wsx qwertyui qwertyuiop qwerty12 qwerty123 qwerty1234 asdfghjk asdfghjkl zxcvbnm1
  password password1 password12 password123 password1234 passw0rd p@ssword p@ssw0rd pa55word passwort passwort1
  iloveyou iloveyou1 sunshine princess football baseball basketball superman batman123 starwars trustno1
  letmein1 letmein123 welcome1 welcome12 welcome123 admin123 admin1234 administrator changeme changeme1
  abcdefgh abcd1234 abc12345 abc123456 a1b2c3d4 aa123456 whatever computer internet samsung1 michelle jennifer
  jordan23 liverpool chelsea1 arsenal1 dragon123 monkey123 master123 shadow123 michael1 charlie1 freedom1
  secret123 hello123 hello1234 google123 test1234 testtest temp1234 guest1234 default1 torfolio torfolio1
  torfolio123 engineer engineer1 engineer123 calculation correcthorsebatterystaple
  `
    .trim()
    .split(/\s+/),
)
