"""The service around the domain library: command line, API and pages."""
