//! The nearest of the known names, for a name that was misspelt.

/// The known name that lies nearest, where one lies near enough to be meant.
pub(crate) fn nearest<'a>(name: &str, known: impl Iterator<Item = &'a str>) -> Option<String> {
    let wanted: Vec<char> = simplify(name);
    let mut best: Option<(usize, &str)> = None;
    for candidate in known {
        let other = simplify(candidate);
        let most = (wanted.len().max(other.len()) / 3).clamp(1, 3);
        let Some(distance) = distance(&wanted, &other, most) else {
            continue;
        };
        // A one-letter name is near to every other one: only a change of case or of a stroke counts there.
        if wanted.len() < 2 && distance > 0 {
            continue;
        }
        if best.is_none_or(|(least, _)| distance < least) {
            best = Some((distance, candidate));
        }
    }
    best.map(|(_, name)| name.to_string())
}

/// The known name that only looks the same, its letters being of another script.
pub(crate) fn other_script<'a>(
    name: &str,
    mut known: impl Iterator<Item = &'a str>,
) -> Option<String> {
    let wanted: String = name.chars().map(look).collect();
    known
        .find(|k| *k != name && k.chars().map(look).collect::<String>() == wanted)
        .map(str::to_string)
}

/// Case and strokes between parts do not make a name another one.
fn simplify(name: &str) -> Vec<char> {
    name.chars()
        .filter(|c| *c != '_' && *c != '\'')
        .flat_map(char::to_lowercase)
        .map(look)
        .collect()
}

/// The Latin letter that a Greek or Cyrillic one looks like.
fn look(c: char) -> char {
    const TWINS: &[(char, char)] = &[
        ('А', 'A'),
        ('В', 'B'),
        ('С', 'C'),
        ('Е', 'E'),
        ('Н', 'H'),
        ('К', 'K'),
        ('М', 'M'),
        ('О', 'O'),
        ('Р', 'P'),
        ('Т', 'T'),
        ('Х', 'X'),
        ('а', 'a'),
        ('с', 'c'),
        ('е', 'e'),
        ('о', 'o'),
        ('р', 'p'),
        ('у', 'y'),
        ('х', 'x'),
        ('Ѕ', 'S'),
        ('ѕ', 's'),
        ('І', 'I'),
        ('і', 'i'),
        ('Ј', 'J'),
        ('ј', 'j'),
        ('Α', 'A'),
        ('Β', 'B'),
        ('Ε', 'E'),
        ('Ζ', 'Z'),
        ('Η', 'H'),
        ('Ι', 'I'),
        ('Κ', 'K'),
        ('Μ', 'M'),
        ('Ν', 'N'),
        ('Ο', 'O'),
        ('Ρ', 'P'),
        ('Τ', 'T'),
        ('Υ', 'Y'),
        ('Χ', 'X'),
        ('ο', 'o'),
        ('ν', 'v'),
        ('Ω', 'Ω'),
        ('µ', 'μ'),
        ('∆', 'Δ'),
    ];
    TWINS
        .iter()
        .find(|(from, _)| *from == c)
        .map_or(c, |(_, to)| *to)
}

/// Edits from one to the other, neighbours swapped counting as one; `None` beyond `most`.
fn distance(a: &[char], b: &[char], most: usize) -> Option<usize> {
    if a.len().abs_diff(b.len()) > most {
        return None;
    }
    let mut before = vec![0; b.len() + 1];
    let mut row: Vec<usize> = (0..=b.len()).collect();
    for (i, ca) in a.iter().enumerate() {
        let mut next = vec![i + 1; b.len() + 1];
        for (j, cb) in b.iter().enumerate() {
            let change = row[j] + usize::from(ca != cb);
            next[j + 1] = change.min(row[j + 1] + 1).min(next[j] + 1);
            if i > 0 && j > 0 && *ca == b[j - 1] && a[i - 1] == *cb {
                next[j + 1] = next[j + 1].min(before[j - 1] + 1);
            }
        }
        before = std::mem::replace(&mut row, next);
    }
    row.last().copied().filter(|d| *d <= most)
}

#[cfg(test)]
mod tests {
    use super::{nearest, other_script};

    #[test]
    fn finds_what_was_meant() {
        let known = ["P_t", "S", "x_cg", "weight"];
        assert_eq!(nearest("Pt", known.into_iter()), Some("P_t".into()));
        assert_eq!(nearest("x_gc", known.into_iter()), Some("x_cg".into()));
        assert_eq!(nearest("s", known.into_iter()), Some("S".into()));
        assert_eq!(nearest("Q", known.into_iter()), None);
        assert_eq!(nearest("velocity", known.into_iter()), None);
    }

    #[test]
    fn sees_letters_of_another_script() {
        assert_eq!(other_script("С_L", ["C_L"].into_iter()), Some("C_L".into()));
        assert_eq!(other_script("C_L", ["C_L"].into_iter()), None);
    }
}
