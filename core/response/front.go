package response

// frontOn gives the load of a travelling front on the modes.
func (c *Case) frontOn(p *projector, g *given) acting { return acting{} }
