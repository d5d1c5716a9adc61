/** Names that would close a comment, open markup, continue a line, make a trigraph or turn the writing direction. */
export const hostileNames = [
  '*/ int main(void) { return 1; } /*',
  'ends in a backslash \\',
  'trigraph ??/ and ??)',
  '<script>alert(1)</script>',
  '--> <!-- x',
  '| a | b |',
  '`code` ``` and ~~~',
  '[link](https://example.org) ![x](y) <b>',
  'line\nbreak\r\n# heading\n| a |',
  '\u202Eright to left\u202C \u0000\u0007\u2028',
  'ö 漢字 \u{1F39B} \uD800',
  '"quoted" \'single\' $x$ {{y}} %n; do not edit; made from sha256 ',
  '=HYPERLINK("x")',
  ' spaces around ',
  '_under_ *star* #1 &amp; &#42;',
] as const;
