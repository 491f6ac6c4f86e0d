//! What a building is: values checked on construction, quantities with units.
