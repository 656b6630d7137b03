"""How much of what: ratio, conversion, yield, purity and solvent content, each with its uncertainty."""
