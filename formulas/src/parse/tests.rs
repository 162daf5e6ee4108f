//! Samples of the grammar.

use super::parse;
use crate::syntax::{DefinitionValue, StatementKind};

#[test]
fn statements_put_together_are_the_text() {
    let text = "title T\r\n\r\na [ft] = 1 +\n  2 ; remark\ntable p | q\nA | 1\nend\nb == 2\n";
    let tree = parse(text);
    let together: String = tree
        .statements
        .iter()
        .map(|s| &text[s.start..s.start + s.length])
        .collect();
    assert_eq!(together, text);
    assert_eq!(tree.statements.len(), 5);
    let StatementKind::Definition(definition) = &tree.statements[2].kind else {
        panic!("no definition");
    };
    assert!(matches!(definition.value, DefinitionValue::One(_)));
}
