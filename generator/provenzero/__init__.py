"""Lock-out permits for hydraulic control units: from a description of the steel to a plan that is proven."""

__version__ = "0.1.0"
