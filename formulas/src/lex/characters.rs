//! Which characters names, blanks and raised powers are made of.

use unicode_normalization::char::is_combining_mark;

/// Whether `character` separates words and means nothing by itself. Control characters and marks without width come
/// along when text is pasted; they count as blanks.
#[must_use]
pub(crate) fn is_blank(character: char) -> bool {
    if character.is_ascii() {
        return (character == ' ' || character.is_ascii_control())
            && !matches!(character, '\n' | '\r');
    }
    character.is_whitespace()
        || character.is_control()
        || matches!(character, '\u{200b}' | '\u{2060}' | '\u{feff}')
}

/// Whether a name may begin with it.
#[must_use]
pub(crate) fn is_name_start(character: char) -> bool {
    character.is_alphabetic() && !is_combining_mark(character)
}

/// Whether a name may go on with it.
#[must_use]
pub(crate) fn is_name_part(character: char) -> bool {
    if character.is_ascii() {
        return character.is_ascii_alphanumeric() || matches!(character, '_' | '\'');
    }
    (character.is_alphanumeric() && raised(character).is_none()) || is_combining_mark(character)
}

/// The digit or minus sign that a raised character stands for.
#[must_use]
pub(crate) fn raised(character: char) -> Option<char> {
    Some(match character {
        '\u{2070}' => '0',
        '\u{b9}' => '1',
        '\u{b2}' => '2',
        '\u{b3}' => '3',
        '\u{2074}'..='\u{2079}' => {
            return char::from_digit(character as u32 - 0x2070, 10);
        }
        '\u{207b}' => '-',
        _ => return None,
    })
}

/// Whether it is one of the dashes that stand for a value left out.
#[must_use]
pub(crate) fn is_dash(character: char) -> bool {
    matches!(character, '-' | '\u{2212}' | '\u{2010}'..='\u{2015}')
}

/// For each byte whether it is a character that a name may go on with by itself.
static PLAIN_PART: [bool; 256] = {
    let mut table = [false; 256];
    let mut byte = 0u8;
    while byte < 128 {
        table[byte as usize] = byte.is_ascii_alphanumeric() || matches!(byte, b'_' | b'\'');
        byte += 1;
    }
    table
};

/// Whether a byte is a whole character that a name may go on with.
pub(crate) fn is_plain_part(byte: u8) -> bool {
    PLAIN_PART[byte as usize]
}

/// How many bytes of `text` a name at its start takes; 0 if none starts there.
#[must_use]
pub(crate) fn name_length(text: &str) -> usize {
    let bytes = text.as_bytes();
    let first = bytes.first().copied().unwrap_or(b' ');
    if first.is_ascii() && !first.is_ascii_alphabetic() {
        return 0;
    }
    let plain = bytes
        .iter()
        .position(|byte| !is_plain_part(*byte))
        .unwrap_or(bytes.len());
    if bytes.get(plain).is_none_or(u8::is_ascii) {
        return plain;
    }
    let mut characters = text.char_indices();
    if !characters
        .next()
        .is_some_and(|(_, character)| is_name_start(character))
    {
        return 0;
    }
    characters
        .find(|(_, character)| !is_name_part(*character))
        .map_or(text.len(), |(at, _)| at)
}

/// How many bytes of `text` the blanks at its start take.
#[must_use]
pub(crate) fn blank_length(text: &str) -> usize {
    let plain = text
        .bytes()
        .position(|byte| byte != b' ')
        .unwrap_or(text.len());
    match text.as_bytes().get(plain) {
        None => plain,
        Some(byte) if byte.is_ascii_graphic() => plain,
        Some(_) => text
            .find(|character| !is_blank(character))
            .unwrap_or(text.len()),
    }
}

/// The text without blanks at both ends.
#[must_use]
pub(crate) fn trimmed(text: &str) -> &str {
    text.trim_matches(|character: char| is_blank(character) || matches!(character, '\n' | '\r'))
}
