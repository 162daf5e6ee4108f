//! The form of a definition: what makes a line give a symbol or a function its value.

use crate::lex::signs::mend_of;
use crate::token::{Token, TokenKind};

/// What a line of the form of a definition defines.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub(super) enum Form {
    Symbol,
    Function,
}

/// The form of the tokens of a line, blanks left out: a symbol, optional `[unit]`, optional `by axis`, then `=`, or
/// `name(names)`, optional `[unit]`, then `=`.
pub(super) fn form(text: &str, tokens: &[Token]) -> Option<Form> {
    let kind = |at: usize| tokens.get(at).map(|token| token.kind);
    if kind(0) != Some(TokenKind::Name) {
        return None;
    }
    if kind(1) == Some(TokenKind::Open) {
        let close = parameters_end(tokens, 2)?;
        let at = close + usize::from(is_bracket(kind(close)));
        return is_equals(text, tokens.get(at)).then_some(Form::Function);
    }
    let mut at = 1 + usize::from(is_bracket(kind(1)));
    let by = tokens
        .get(at)
        .is_some_and(|token| token.kind == TokenKind::Name && token.span.of(text) == "by");
    if by {
        at += 2;
        while kind(at) == Some(TokenKind::Comma) {
            at += 2;
        }
    }
    is_equals(text, tokens.get(at)).then_some(Form::Symbol)
}

/// The index behind the `)` of a list of parameters.
fn parameters_end(tokens: &[Token], from: usize) -> Option<usize> {
    for (at, token) in tokens.iter().enumerate().skip(from) {
        match token.kind {
            TokenKind::Close => return Some(at + 1),
            TokenKind::Name | TokenKind::Comma | TokenKind::Word(_) => {}
            kind if is_bracket(Some(kind)) => {}
            _ => return None,
        }
    }
    None
}

pub(super) fn is_bracket(kind: Option<TokenKind>) -> bool {
    matches!(kind, Some(TokenKind::Bracket | TokenKind::OpenBracket))
}

/// Whether the token is `=`, or the sign that stands for it in another notation.
pub(super) fn is_equals(text: &str, token: Option<&Token>) -> bool {
    token.is_some_and(|token| match token.kind {
        TokenKind::Equals => true,
        TokenKind::Foreign => mend_of(token.span.of(text)) == Some("="),
        _ => false,
    })
}
