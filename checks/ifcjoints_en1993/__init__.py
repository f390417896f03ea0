"""EN 1993-1-8: moment resistance, stiffness and class of bolted end-plate joints by the component method."""
