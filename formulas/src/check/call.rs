//! Calls: arguments put in their places, catalogue functions with dimensions, kinds and whole lines.

use super::{Checker, Marks, Typed};
use crate::axes::{AxisId, AxisSet};
use crate::catalogue::{Compute, Entry, Gives, Parameter, Wants};
use crate::problem::{Fault, Mend};
use crate::program::{Kind, NodeId, NumberKind, Op};
use crate::span::Span;
use crate::syntax::{Argument, BinaryOp, Expr, ExprKind, Name};
use engine::quantity::{Dimension, SpeedKind, constants};

impl Checker<'_> {
    pub(crate) fn call(
        &mut self,
        function: &Name,
        arguments: &[Argument],
        over: Option<&[Name]>,
        span: Span,
    ) -> Option<Typed> {
        if let Some(statement) = self.names.function(&function.text) {
            self.takes_no_over(function, over)?;
            return self.own_call(statement, arguments, span);
        }
        // An unknown function was reported with the names.
        let entry = crate::catalogue::entry(&function.text)?;
        match entry.compute {
            Compute::Language => self.language_call(entry, function, arguments, over, span),
            _ => self.catalogue_call(entry, function, arguments, over, span),
        }
    }

    /// Refuses an `over` at a function that consumes no axis.
    pub(crate) fn takes_no_over(&mut self, function: &Name, over: Option<&[Name]>) -> Option<()> {
        if over.is_none() {
            return Some(());
        }
        let name = function.text.clone();
        self.report(function.span, Fault::OverNotTaken { function: name });
        None
    }

    /// Puts arguments in their places: by position, then by name. The flag of a parameter says that it is required.
    pub(crate) fn place_arguments<'e>(
        &mut self,
        function: &str,
        parameters: &[(&str, bool)],
        arguments: &'e [Argument],
        span: Span,
    ) -> Option<Vec<Option<&'e Argument>>> {
        let mut placed: Vec<Option<&Argument>> = vec![None; parameters.len()];
        let mut named = false;
        for (at, argument) in arguments.iter().enumerate() {
            let place = match &argument.name {
                Some(name) => {
                    named = true;
                    let Some(place) = parameters.iter().position(|p| p.0 == name.text) else {
                        let names = parameters.iter().map(|p| p.0.to_string()).collect();
                        let nearest =
                            crate::nearest::nearest(&name.text, parameters.iter().map(|p| p.0));
                        let (function, name_text) = (function.to_string(), name.text.clone());
                        let fault = Fault::ArgumentName {
                            function,
                            name: name_text,
                            names,
                            nearest,
                        };
                        self.report(name.span, fault);
                        return None;
                    };
                    place
                }
                None if named || at >= parameters.len() => {
                    return self.wrong_count(
                        function,
                        parameters,
                        arguments.len(),
                        argument.value.span,
                    );
                }
                None => at,
            };
            if placed[place].is_some() {
                let name = parameters[place].0.to_string();
                self.report(
                    argument.value.span,
                    Fault::ArgumentTwice {
                        function: function.to_string(),
                        name,
                    },
                );
                return None;
            }
            placed[place] = Some(argument);
        }
        let missing = placed
            .iter()
            .zip(parameters)
            .find(|(a, p)| a.is_none() && p.1);
        if let Some((_, (name, _))) = missing {
            if !named {
                return self.wrong_count(function, parameters, arguments.len(), span);
            }
            let fault = Fault::ArgumentMissing {
                function: function.to_string(),
                name: (*name).to_string(),
            };
            self.report(span, fault);
            return None;
        }
        Some(placed)
    }

    fn wrong_count<T>(
        &mut self,
        function: &str,
        parameters: &[(&str, bool)],
        found: usize,
        span: Span,
    ) -> Option<T> {
        let least = parameters.iter().filter(|p| p.1).count();
        let fault = Fault::ArgumentCount {
            function: function.to_string(),
            least,
            most: parameters.len(),
            found,
        };
        self.report(span, fault);
        None
    }

    fn catalogue_call(
        &mut self,
        entry: &'static Entry,
        function: &Name,
        arguments: &[Argument],
        over: Option<&[Name]>,
        span: Span,
    ) -> Option<Typed> {
        let parameters: Vec<(&str, bool)> = entry
            .parameters
            .iter()
            .map(|p| (p.name, p.default.is_none() && p.default_text.is_none()))
            .collect();
        let placed = self.place_arguments(entry.name, &parameters, arguments, span)?;
        let mut typed: Vec<Option<Typed>> = Vec::with_capacity(placed.len());
        let mut failed = false;
        for (parameter, argument) in entry.parameters.iter().zip(&placed) {
            let Some(argument) = argument else {
                typed.push(None);
                continue;
            };
            let value = self.argument_value(entry, parameter, &argument.value);
            failed |= value.is_none();
            typed.push(value);
        }
        if failed {
            return None;
        }
        self.airspeed_arguments(entry, &typed)?;
        let axis = self.consumed_axis(entry, function, &typed, over, span)?;
        let made = self.made_axis(entry, span)?;
        let nodes: Vec<Option<NodeId>> = typed.iter().map(|t| t.as_ref().map(|t| t.node)).collect();
        let given: Vec<NodeId> = nodes.iter().copied().flatten().collect();
        let mut axes = self.axes_of_all(&given);
        if let Some(axis) = axis {
            axes = axes.without(AxisSet::of(axis));
        }
        let dimensions: Vec<Dimension> = typed
            .iter()
            .map(|t| t.as_ref().map_or(Dimension::NONE, Typed::dimension))
            .collect();
        let node = self.node(
            Op::Call {
                entry,
                arguments: nodes,
                over: axis,
                made,
            },
            axes,
        );
        self.guards(entry, &typed, axis, axes, span);
        self.note_downwash(entry.name, span);
        let operands: Vec<Typed> = typed.into_iter().flatten().collect();
        self.call_results.insert(node, (dimensions, operands));
        if entry.is_record() {
            return Some(Typed {
                node,
                kind: Kind::Record(entry),
                unit: None,
                span,
                marks: Marks::default(),
            });
        }
        self.field_of_call(entry, node, 0, span)
    }

    fn argument_value(
        &mut self,
        entry: &'static Entry,
        parameter: &Parameter,
        expr: &Expr,
    ) -> Option<Typed> {
        let typed = self.expression(expr)?;
        let dimension = match parameter.wants {
            Wants::Text => return self.text_argument(entry, parameter, expr, typed),
            Wants::ForceOrMass | Wants::MassOrWeight
                if typed.dimension().matches(Dimension::MASS) =>
            {
                Dimension::MASS
            }
            Wants::MassOrWeight => {
                let weight =
                    self.fits_argument(entry.name, parameter.name, Dimension::FORCE, &typed)?;
                let g0 = self.number(constants::G0);
                let node = self.binary(BinaryOp::Divide, weight.node, g0);
                let kind = Kind::Number(NumberKind::of(Dimension::MASS));
                return Some(Typed {
                    node,
                    kind,
                    unit: None,
                    ..weight
                });
            }
            Wants::Any | Wants::Condition => return Some(typed),
            Wants::ForceOrMass => Dimension::FORCE,
            Wants::Dimension(dimension) => dimension,
        };
        if typed.number_kind().any && parameter.default.is_some_and(f64::is_nan) {
            return Some(typed);
        }
        let typed = self.fits_argument(entry.name, parameter.name, dimension, &typed)?;
        if parameter.difference
            && (typed.marks.scale || (typed.number_kind().absolute && !typed.marks.literal))
        {
            self.report(
                expr.span,
                Fault::TemperatureDifference {
                    text: self.words(expr.span),
                },
            );
            return None;
        }
        let kind = typed.number_kind();
        if dimension.is_angle() && !kind.dimension.is_angle() && !kind.any && !typed.marks.zero {
            self.warn_angle(expr, parameter.name);
        }
        self.advise_slope(parameter, expr, &typed);
        if let Some(most) = parameter.most
            && typed.marks.bare
            && self.constant_of(typed.node).is_some_and(|v| v > most)
        {
            let text = format!("at most {most}, such as 0.25 or 25 %");
            self.report_range(entry, parameter, expr.span, text);
            return None;
        }
        Some(typed)
    }

    /// A bare lift slope below 1 looks like one per degree.
    fn advise_slope(&mut self, parameter: &Parameter, expr: &Expr, typed: &Typed) {
        let dimension = typed.number_kind().dimension;
        if !parameter.slope || !typed.marks.bare || dimension != Dimension::NONE {
            return;
        }
        let value = self.constant_of(typed.node).unwrap_or(1.0);
        if value > 0.0 && value < 1.0 {
            let number = matches!(expr.kind, ExprKind::Number { .. }).then_some(expr.span);
            let argument = parameter.name.to_string();
            self.report(
                expr.span,
                Fault::SlopePerDegree {
                    argument,
                    value,
                    number,
                },
            );
        }
    }

    /// Tells that an argument lies outside what it can be at all.
    fn report_range(&mut self, entry: &Entry, parameter: &Parameter, span: Span, text: String) {
        let fault = Fault::ArgumentRange {
            function: entry.name.to_string(),
            argument: parameter.name.to_string(),
            text,
        };
        self.report(span, fault);
    }

    /// A number of the right dimension; a lone `0` and `none` fit any.
    pub(crate) fn fits_argument(
        &mut self,
        function: &str,
        argument: &str,
        wanted: Dimension,
        typed: &Typed,
    ) -> Option<Typed> {
        let typed = self.wants_number(typed.clone(), argument)?;
        let kind = typed.number_kind();
        // A bare number takes a unit nowhere but under a bracket, and 0 is no exception as an argument.
        if kind.any || kind.dimension.matches(wanted) {
            return Some(typed);
        }
        if kind
            .dimension
            .times(Dimension::ACCELERATION)
            .is_some_and(|d| d.matches(wanted))
        {
            self.report_mass(&typed);
            return None;
        }
        let fault = Fault::ArgumentDimension {
            function: function.to_string(),
            argument: argument.to_string(),
            wanted,
            value: self.operand(&typed),
        };
        self.report(typed.span, fault);
        self.likely_other_unit(&typed, wanted);
        None
    }

    fn text_argument(
        &mut self,
        entry: &'static Entry,
        parameter: &Parameter,
        expr: &Expr,
        typed: Typed,
    ) -> Option<Typed> {
        let word = (typed.kind == Kind::Text)
            .then(|| self.fixed_text(&typed).map(str::to_owned))
            .flatten();
        if let Some(word) = &word
            && !parameter.words.is_empty()
            && !parameter.words.contains(&word.as_str())
        {
            // A word that stands in another line is mended there.
            let typed_here = matches!(expr.kind, ExprKind::Text(_));
            let near = || crate::nearest::nearest(word, parameter.words.iter().copied());
            let fault = Fault::UnknownWord {
                function: entry.name.to_string(),
                argument: parameter.name.to_string(),
                found: word.clone(),
                words: parameter.words.iter().map(|w| (*w).to_string()).collect(),
                nearest: typed_here.then(near).flatten(),
            };
            self.report(expr.span, fault);
            return None;
        }
        if let Some(word) = word.filter(|_| parameter.name == "rule") {
            self.note_rule(&word, expr.span);
        }
        if typed.kind == Kind::Text || typed.number_kind().any {
            return Some(typed);
        }
        let is_number = matches!(expr.kind, ExprKind::Number { unit: None, .. });
        let quote = is_number.then(|| Mend {
            span: expr.span,
            text: format!("\"{}\"", self.words(expr.span)),
        });
        let place = format!("{} of {}", parameter.name, entry.name);
        let found = super::operand::kind_name(typed.kind);
        self.report(
            expr.span,
            Fault::WrongKind {
                place,
                wanted: "text",
                found,
                quote,
            },
        );
        None
    }

    /// Airspeeds of the kind that the function means. True airspeed may be equivalent where the density is rho0.
    fn airspeed_arguments(&mut self, entry: &'static Entry, typed: &[Option<Typed>]) -> Option<()> {
        let density = entry.parameters.iter().position(|p| p.name == "density");
        for (parameter, argument) in entry.parameters.iter().zip(typed) {
            let (Some(wanted), Some(argument)) = (parameter.speed, argument) else {
                continue;
            };
            let Some(given) = argument.number_kind().speed else {
                continue;
            };
            if given == wanted {
                continue;
            }
            if wanted == SpeedKind::True
                && let Some(density) = density.and_then(|d| typed.get(d)?.as_ref())
            {
                if given == SpeedKind::Equivalent && density.marks.sea_level {
                    continue;
                }
                let speed = self.words(argument.span);
                let fault = if given == SpeedKind::Equivalent {
                    Fault::EquivalentWithDensity {
                        speed,
                        density: self.words(density.span),
                    }
                } else {
                    Fault::CalibratedInPressure { speed }
                };
                self.report(argument.span, fault);
                return None;
            }
            let fault = Fault::ArgumentSpeedKind {
                function: entry.name.to_string(),
                argument: parameter.name.to_string(),
                wanted: Some(wanted),
                given,
            };
            self.report(argument.span, fault);
            return None;
        }
        Some(())
    }

    /// The axis that a whole-line function consumes.
    fn consumed_axis(
        &mut self,
        entry: &'static Entry,
        function: &Name,
        typed: &[Option<Typed>],
        over: Option<&[Name]>,
        span: Span,
    ) -> Option<Option<AxisId>> {
        if !entry.takes_lines() {
            self.takes_no_over(function, over)?;
            return Some(None);
        }
        let lines = entry
            .parameters
            .iter()
            .zip(typed)
            .filter(|(p, _)| p.line)
            .filter_map(|(_, t)| t.as_ref());
        let possible = lines.fold(AxisSet::NONE, |axes, t| axes.with(self.axes_of(t.node)));
        self.single_axis(&function.text, over, possible, span)
            .map(Some)
    }

    /// The axis of an `over`, or the only possible one where it is left out.
    pub(crate) fn single_axis(
        &mut self,
        function: &str,
        over: Option<&[Name]>,
        possible: AxisSet,
        span: Span,
    ) -> Option<AxisId> {
        if let Some([axis]) = over {
            let id = *self.axis_of_symbol.get(&axis.text)?;
            if !possible.has(id) {
                let fault = Fault::AxisNotVaried {
                    function: function.to_string(),
                    axis: axis.text.clone(),
                    refused: true,
                };
                self.report(axis.span, fault);
                return None;
            }
            return Some(id);
        }
        if over.is_none() && possible.count() == 1 {
            return possible.iter().next();
        }
        let axes = possible
            .iter()
            .map(|a| self.program.axes[a.0 as usize].name.clone())
            .collect();
        self.report(
            span,
            Fault::OverMissing {
                function: function.to_string(),
                axes,
            },
        );
        None
    }

    /// A field of a call; a function that gives a single value has one.
    pub(crate) fn field_of_call(
        &mut self,
        entry: &'static Entry,
        call: NodeId,
        at: usize,
        span: Span,
    ) -> Option<Typed> {
        let field = entry.fields.get(at)?;
        let (dimensions, operands) = self.call_results.get(&call).cloned().unwrap_or_default();
        let dimension = match field.gives {
            Gives::Dimension(dimension) => dimension,
            Gives::Argument(index, factor) => dimensions
                .get(index)
                .copied()
                .unwrap_or(Dimension::NONE)
                .times(factor)?,
        };
        let mut axes = self.axes_of(call);
        if let Some(Op::Call { over, made, .. }) =
            self.program.nodes.get(call.0 as usize).map(|n| &n.op)
        {
            let along = over.filter(|_| field.line).into_iter();
            let along = along.chain(made.filter(|_| field.made));
            axes = along.fold(axes, |axes, axis| axes.with(AxisSet::of(axis)));
        }
        let node = self.node(Op::Field(call, at), axes);
        let kind = NumberKind {
            speed: field.speed,
            absolute: field.absolute,
            ..NumberKind::of(dimension)
        };
        let refs: Vec<&Typed> = operands.iter().collect();
        let unit = match (field.speed, field.shown) {
            (_, Some(shown)) => super::units::unit_of_text(shown),
            (Some(speed), None) => self
                .usual_unit(dimension, &refs)
                .map(|u| speed_unit(u, speed)),
            (None, None) => self.usual_unit(dimension, &refs),
        };
        Some(Typed {
            node,
            kind: Kind::Number(kind),
            unit,
            span,
            marks: Marks::systems_of(&refs),
        })
    }
}

/// The unit of a speed of a kind: `KEAS` for `kt`, else the kind behind it.
fn speed_unit(unit: crate::program::ShownUnit, kind: SpeedKind) -> crate::program::ShownUnit {
    if unit.unit.speed_kind.is_some() {
        return unit;
    }
    let text = match &*unit.text {
        "kt" | "kn" | "kts" => format!("K{}", kind.word()),
        text => format!("{text} {}", kind.word()),
    };
    crate::program::ShownUnit {
        text: std::rc::Rc::from(text.as_str()),
        unit: unit.unit.of_kind(kind),
    }
}
