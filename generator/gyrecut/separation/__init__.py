"""What the separator will do: forecasts that combine the published correlations."""
