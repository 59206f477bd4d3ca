"""Charts: projections, graticules, plotting sheets and the shoreline. They take points and lines, not a plan."""
