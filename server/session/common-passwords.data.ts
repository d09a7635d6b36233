/** Of the commonest passwords, those long enough to pass the length rule, with punctuation squeezed out. From memory. */
export const commonPasswords: ReadonlySet<string> = new Set([
  '123456789012', '1234567890123', '123456123456', '123123123123', '111111111111', '000000000000', '987654321098', '012345678901',
  'password1234', 'password12345', 'password123456', 'passwordpassword', 'passw0rd1234', 'p4ssword1234', 'mypassword123', 'changeme1234', 'changemenow1',
  'qwertyuiop12', 'qwertyuiop123', 'qwerty123456', 'qwertyqwerty', '1q2w3e4r5t6y', '1qaz2wsx3edc', 'qazwsxedcrfv', 'zxcvbnm12345', 'asdfghjkl123', 'abcdefghijkl', 'abcd12345678', 'abc123abc123', 'a1b2c3d4e5f6',
  'letmeinplease', 'letmein12345', 'iloveyou1234', 'iloveyouforever', 'welcome12345', 'welcome123456', 'administrator', 'administrator1', 'admin1234567', 'adminadminadmin', 'administrator123',
  'trustno1trustno1', 'sunshine1234', 'princess1234', 'football1234', 'baseball1234', 'superman1234', 'monkey123456', 'dragon123456', 'correcthorsebatterystaple',
  'summer2024summer', 'winter2024winter', 'summer2025summer', 'summer2026summer', 'winter2026winter', 'testtesttest', 'test12345678', 'default12345', 'secret123456', 'kneeboard123', 'kneeboard1234',
]);
