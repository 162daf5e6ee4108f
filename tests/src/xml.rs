//! Whether a text is well-formed XML, as far as drawings and pages use it: elements, attributes, text, entities.

/// Says what is wrong, at which byte.
///
/// # Errors
/// Where an element is not closed in turn, an attribute not quoted, or a character stands bare that has to be escaped.
pub fn well_formed(text: &str) -> Result<(), String> {
    let mut open: Vec<&str> = Vec::new();
    let mut rest = text.trim();
    let mut seen = false;
    while !rest.is_empty() {
        let place = text.len() - rest.len();
        let wrong = |what: &str| format!("{what} at byte {place}: {}", head(rest));
        if let Some(tag) = rest.strip_prefix('<') {
            let end = end_of_tag(tag).ok_or_else(|| wrong("tag not closed"))?;
            let (inner, after) = (&tag[..end], &tag[end + 1..]);
            if open.is_empty() && seen && !inner.starts_with('/') {
                return Err(wrong("a second root"));
            }
            if let Some(name) = inner.strip_prefix('/') {
                if open.pop() != Some(name.trim()) {
                    return Err(wrong("closed out of turn"));
                }
            } else {
                let (name, closed) = element(inner).map_err(|e| wrong(&e))?;
                if !closed {
                    open.push(name);
                }
            }
            seen = true;
            rest = after;
        } else {
            let end = rest.find('<').unwrap_or(rest.len());
            characters(&rest[..end]).map_err(|e| wrong(&e))?;
            if open.is_empty() {
                return Err(wrong("text outside the root"));
            }
            rest = &rest[end..];
        }
    }
    match open.last() {
        Some(name) => Err(format!("{name} is never closed")),
        None => Ok(()),
    }
}

fn head(text: &str) -> String {
    text.chars().take(60).collect()
}

/// Where the `>` of a tag stands, quotes passed over.
fn end_of_tag(tag: &str) -> Option<usize> {
    let mut quoted = false;
    for (i, c) in tag.char_indices() {
        match c {
            '"' => quoted = !quoted,
            '>' if !quoted => return Some(i),
            _ => {}
        }
    }
    None
}

fn element(inner: &str) -> Result<(&str, bool), String> {
    let (inner, closed) = match inner.strip_suffix('/') {
        Some(inner) => (inner, true),
        None => (inner, false),
    };
    let (name, mut rest) = inner.split_once(' ').unwrap_or((inner, ""));
    if name.is_empty() || !name.chars().all(|c| c.is_ascii_alphanumeric() || c == '-') {
        return Err(format!("not a name: {name:?}"));
    }
    let mut names = Vec::new();
    while !rest.trim().is_empty() {
        let (key, after) = rest
            .trim_start()
            .split_once("=\"")
            .ok_or("attribute without quotes")?;
        let (value, after) = after.split_once('"').ok_or("quotes not closed")?;
        if names.contains(&key) || key.contains(char::is_whitespace) {
            return Err(format!("attribute {key:?}"));
        }
        names.push(key);
        characters(value)?;
        rest = after;
    }
    Ok((name, closed))
}

fn characters(text: &str) -> Result<(), String> {
    if text.contains('<') {
        return Err("a bare <".to_owned());
    }
    for (i, _) in text.match_indices('&') {
        let entity = text[i + 1..].split_once(';').map(|(name, _)| name);
        if !matches!(entity, Some("amp" | "lt" | "gt" | "quot" | "#39")) {
            return Err(format!("a bare & before {}", head(&text[i..])));
        }
    }
    match text
        .chars()
        .find(|c| c.is_control() && !matches!(c, '\n' | '\t' | '\r'))
    {
        Some(c) => Err(format!("character {c:?}")),
        None => Ok(()),
    }
}

#[cfg(test)]
mod tests {
    use super::well_formed;

    #[test]
    fn what_is_not_well_formed_is_told() {
        assert_eq!(well_formed("<a b=\"1 > 0\"><c/>&lt;x</a>"), Ok(()));
        for text in [
            "<a>",
            "<a></b>",
            "<a>&</a>",
            "<a b=c/>",
            "<a/><b/>",
            "<a><b></a></b>",
            "x",
            "<a b=\"<\"/>",
        ] {
            assert!(well_formed(text).is_err(), "{text}");
        }
    }
}
