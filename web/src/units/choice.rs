//! The units that can be picked.

use serde::{Deserialize, Serialize};

/// Declares a choice of units: name, symbol, and the unit of the library.
macro_rules! choice {
    ($(#[$doc:meta])* $name:ident { $($(#[$item_doc:meta])* $item:ident = $symbol:literal),+ $(,)? }) => {
        $(#[$doc])*
        #[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize, Deserialize)]
        pub enum $name { $($(#[$item_doc])* $item),+ }

        impl $name {
            /// Every choice, in the order shown.
            pub const ALL: &'static [Self] = &[$(Self::$item),+];

            /// The unit as written behind a figure.
            #[must_use]
            pub fn symbol(self) -> &'static str {
                match self { $(Self::$item => $symbol),+ }
            }
        }
    };
}

choice! {
    /// Unit of lengths on the propeller.
    LengthUnit {
        /// Millimetre.
        Millimetre = "mm",
        /// Inch.
        Inch = "in",
    }
}
choice! {
    /// Unit of airspeed.
    SpeedUnit {
        /// Kilometre per hour.
        KilometrePerHour = "km/h",
        /// Knot.
        Knot = "kt",
        /// Statute mile per hour.
        MilePerHour = "mph",
        /// Metre per second.
        MetrePerSecond = "m/s",
    }
}
choice! {
    /// Unit of force.
    ForceUnit {
        /// Newton.
        Newton = "N",
        /// Pound-force.
        PoundForce = "lbf",
        /// Kilogram-force.
        KilogramForce = "kgf",
    }
}
choice! {
    /// Unit of power.
    PowerUnit {
        /// Kilowatt.
        Kilowatt = "kW",
        /// Watt.
        Watt = "W",
        /// Mechanical horsepower, 550 foot-pounds a second.
        Horsepower = "hp",
    }
}
choice! {
    /// Unit of height.
    HeightUnit {
        /// Metre.
        Metre = "m",
        /// Foot.
        Foot = "ft",
    }
}
choice! {
    /// Unit of torque.
    TorqueUnit {
        /// Newton metre.
        NewtonMetre = "N m",
        /// Pound-force foot.
        PoundFoot = "lbf ft",
    }
}
choice! {
    /// Unit of mass.
    MassUnit {
        /// Kilogram.
        Kilogram = "kg",
        /// Pound.
        Pound = "lb",
    }
}
choice! {
    /// Unit of area.
    AreaUnit {
        /// Square metre.
        SquareMetre = "m²",
        /// Square foot.
        SquareFoot = "ft²",
    }
}
